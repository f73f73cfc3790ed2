namespace ChainSolve.Binding;

/// <summary>Binds the lets, each after those it uses.</summary>
internal sealed class LetBinder(BindContext context, NameTable names, ExpressionBinder expressions)
{
    public void BindAll()
    {
        foreach (var let in new LetOrder(names, context).Sort())
        {
            context.Sink.Enter(let.Syntax);
            if (let.IsFunction)
            {
                CheckParameters(let);
            }
            else if (!let.IsCyclic)
            {
                let.Value = expressions.Bind(let.Syntax.Value, ExprScope.Top);
            }
        }
    }

    private void CheckParameters(LetSymbol let)
    {
        var seen = new HashSet<string>(StringComparer.Ordinal);
        foreach (var parameter in let.Syntax.Parameters!.Where(p => !seen.Add(p.Text)))
        {
            context.Report(BindingFaults.ParameterTwice(parameter));
        }
    }
}
