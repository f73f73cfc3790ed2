using ChainSolve.Numerics.Operators;

namespace ChainSolve.Numerics.Structure;

/// <summary>
/// The strongly connected components of the graph of positive rates (R. Tarjan, SIAM J. Comput. 1 (1972) 146-160), with
/// an explicit stack, so that long chains do not exhaust the thread's.
/// </summary>
internal sealed class StrongComponents
{
    private const int StatesBetweenLooks = 1 << 16;

    private StrongComponents(int[] componentOf, int count)
    {
        ComponentOf = componentOf;
        Count = count;
    }

    /// <summary>The component of each state; -1 outside of the mask. A rate never leads to a component with a higher number.</summary>
    public int[] ComponentOf { get; }

    public int Count { get; }

    /// <summary>Finds the components of the states in the mask, along rates between them; null for all states.</summary>
    public static StrongComponents Find(Generator generator, bool[]? alive, CancellationToken cancellation)
    {
        var rows = generator.Rows;
        var n = rows.Count;
        var component = new int[n];
        var low = new int[n];
        var nextEntry = new long[n];
        var path = new int[n];
        var open = new int[n];
        Array.Fill(component, -1);
        var (pathLength, openLength, visited, count) = (0, 0, 0, 0);

        var number = new int[n];
        for (var root = 0; root < n; root++)
        {
            if (number[root] != 0 || (alive is not null && !alive[root]))
            {
                continue;
            }

            Enter(root);
            while (pathLength > 0)
            {
                var at = path[pathLength - 1];
                var descended = false;
                while (nextEntry[at] < rows.Offsets[at + 1])
                {
                    var e = nextEntry[at]++;
                    var to = rows.Targets[e];
                    if (rows.Values[e] == 0 || (alive is not null && !alive[to]))
                    {
                        continue;
                    }

                    if (number[to] == 0)
                    {
                        Enter(to);
                        descended = true;
                        break;
                    }

                    if (component[to] < 0)
                    {
                        low[at] = Math.Min(low[at], number[to]);
                    }
                }

                if (descended)
                {
                    continue;
                }

                pathLength--;
                if (pathLength > 0)
                {
                    low[path[pathLength - 1]] = Math.Min(low[path[pathLength - 1]], low[at]);
                }

                if (low[at] == number[at])
                {
                    int member;
                    do
                    {
                        member = open[--openLength];
                        component[member] = count;
                    }
                    while (member != at);
                    count++;
                }
            }
        }

        return new StrongComponents(component, count);

        void Enter(int state)
        {
            if (visited % StatesBetweenLooks == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            number[state] = low[state] = ++visited;
            nextEntry[state] = rows.Offsets[state];
            path[pathLength++] = state;
            open[openLength++] = state;
        }
    }
}
