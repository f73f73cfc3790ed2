namespace ChainSolve.Binding;

/// <summary>
/// Finds an order in which every let comes after those it uses, and the circles that make this impossible. Without
/// recursion, so that chains of any length are fine.
/// </summary>
internal sealed class LetOrder(NameTable names, BindContext context)
{
    private readonly Dictionary<LetSymbol, IEnumerator<LetSymbol>> open = [];
    private readonly HashSet<LetSymbol> done = [];
    private readonly List<LetSymbol> ordered = [];

    /// <summary>The lets in order; those in a circle, or leaning on one, are marked and reported once a circle.</summary>
    public IReadOnlyList<LetSymbol> Sort()
    {
        foreach (var let in names.All.OfType<LetSymbol>())
        {
            if (!done.Contains(let))
            {
                Visit(let);
            }
        }

        return ordered;
    }

    private void Visit(LetSymbol root)
    {
        var path = new Stack<LetSymbol>();
        Open(root, path);
        while (path.TryPeek(out var let))
        {
            if (!open[let].MoveNext())
            {
                path.Pop();
                open.Remove(let);
                done.Add(let);
                ordered.Add(let);
                if (let.IsCyclic && path.TryPeek(out var user))
                {
                    user.IsCyclic = true;
                }

                continue;
            }

            var next = open[let].Current;
            if (open.ContainsKey(next))
            {
                ReportCycle(next, path);
            }
            else if (!done.Contains(next))
            {
                Open(next, path);
            }
            else
            {
                let.IsCyclic |= next.IsCyclic;
            }
        }
    }

    private void Open(LetSymbol let, Stack<LetSymbol> path)
    {
        path.Push(let);
        open.Add(let, LetUses.Of(let, names).GetEnumerator());
    }

    private void ReportCycle(LetSymbol first, Stack<LetSymbol> path)
    {
        if (first.IsCyclic && path.Peek().IsCyclic)
        {
            return;
        }

        var circle = path.TakeWhile(l => l != first).Append(first).Reverse().ToList();
        var isNew = !circle.Exists(l => l.IsCyclic);
        foreach (var let in circle)
        {
            let.IsCyclic = true;
        }

        if (!isNew)
        {
            return;
        }

        // A circle begins at the let that stands first in the text, so that the message does not depend on the way in.
        var start = circle.IndexOf(circle.MinBy(l => l.Name.Span.Start)!);
        var turned = circle.Skip(start).Concat(circle.Take(start)).ToList();
        context.Sink.Enter(turned[0].Syntax);
        context.Report(BindingFaults.Cycle(turned[0].Name, Shown(turned)));
    }

    private static IEnumerable<string> Shown(List<LetSymbol> circle)
    {
        const int most = 12;
        var names = circle.Append(circle[0]).Select(l => l.Name.Text).ToList();
        return names.Count <= most ? names : [.. names.Take(most / 2), "…", .. names.TakeLast(2)];
    }
}
