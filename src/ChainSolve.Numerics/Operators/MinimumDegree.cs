namespace ChainSolve.Numerics.Operators;

/// <summary>
/// Minimum-degree ordering on a quotient graph with approximate degrees (Amestoy, Davis and Duff, SIAM J. Matrix Anal.
/// Appl. 17 (1996) 886-905; from memory), without supervariables. One run an instance.
/// </summary>
internal sealed class MinimumDegree
{
    private readonly int count;

    // What is left of the graph: by variable its neighbours that no element covers, and the elements that hold it.
    private readonly int[][] neighbours;
    private readonly List<int>[] elements;
    private readonly int[]?[] members;

    // Variables by degree, as doubly linked lists.
    private readonly int[] first;
    private readonly int[] next;
    private readonly int[] previous;
    private readonly int[] degree;
    private readonly bool[] isDone;

    private readonly int[] mark;
    private readonly int[] outside;
    private readonly int[] outsideMark;
    private int lowest;

    /// <summary>Takes over the neighbour lists: symmetric, without the variable itself.</summary>
    public MinimumDegree(int[][] neighbours)
    {
        count = neighbours.Length;
        this.neighbours = neighbours;
        elements = new List<int>[count];
        members = new int[count][];
        (first, next, previous, degree) = (new int[count], new int[count], new int[count], new int[count]);
        (isDone, mark, outside, outsideMark) = (new bool[count], new int[count], new int[count], new int[count]);
        Array.Fill(first, -1);
        for (var i = count - 1; i >= 0; i--)
        {
            elements[i] = [];
            degree[i] = neighbours[i].Length;
            Link(i);
        }
    }

    /// <summary>The entries on one side of the diagonal, of what was eliminated so far.</summary>
    public long Fill { get; private set; }

    /// <summary>The multiplications, of what was eliminated so far.</summary>
    public double Updates { get; private set; }

    /// <summary>The order; null as soon as the fill goes beyond the limit.</summary>
    public int[]? Run(long maxFill)
    {
        var order = new int[count];
        for (var step = 0; step < count; step++)
        {
            var pivot = TakeLowest();
            order[step] = pivot;
            var row = Gather(pivot, step + 1);
            Fill += row.Length;
            Updates += (double)row.Length * row.Length;
            if (Fill > maxFill)
            {
                return null;
            }

            var left = count - step - 1;
            if (row.Length == left)
            {
                // All that is left is one full block: any order fills the same.
                for (var size = left - 1; size >= 0; size--)
                {
                    Fill += size;
                    Updates += (double)size * size;
                }

                row.CopyTo(order, step + 1);
                return Fill > maxFill ? null : order;
            }

            Eliminate(pivot, row, step + 1, left);
        }

        return order;
    }

    private int[] Gather(int pivot, int stamp)
    {
        mark[pivot] = stamp;
        var row = new List<int>();
        foreach (var i in neighbours[pivot])
        {
            Take(i);
        }

        foreach (var e in elements[pivot])
        {
            foreach (var i in members[e] ?? [])
            {
                Take(i);
            }

            // The new element holds all that this one held.
            members[e] = null;
        }

        elements[pivot] = [];
        neighbours[pivot] = [];
        return [.. row];

        void Take(int i)
        {
            if (!isDone[i] && mark[i] != stamp)
            {
                mark[i] = stamp;
                row.Add(i);
            }
        }
    }

    private void Eliminate(int pivot, int[] row, int stamp, int left)
    {
        members[pivot] = row;
        foreach (var i in row)
        {
            foreach (var e in elements[i])
            {
                if (members[e] is not { } held)
                {
                    continue;
                }

                if (outsideMark[e] != stamp)
                {
                    outsideMark[e] = stamp;
                    outside[e] = held.Length;
                }

                outside[e]--;
            }
        }

        foreach (var i in row)
        {
            Unlink(i);
            neighbours[i] = Array.FindAll(neighbours[i], j => !isDone[j] && mark[j] != stamp);
            var bound = neighbours[i].Length + row.Length - 1;
            var kept = 0;
            var held = elements[i];
            for (var k = 0; k < held.Count; k++)
            {
                var e = held[k];
                if (members[e] is null)
                {
                    continue;
                }

                if (outside[e] == 0)
                {
                    members[e] = null;
                    continue;
                }

                bound += outside[e];
                held[kept++] = e;
            }

            held.RemoveRange(kept, held.Count - kept);
            held.Add(pivot);
            degree[i] = Math.Min(Math.Min(left - 1, degree[i] + row.Length - 1), bound);
            Link(i);
        }
    }

    private int TakeLowest()
    {
        while (first[lowest] < 0)
        {
            lowest++;
        }

        var pivot = first[lowest];
        Unlink(pivot);
        isDone[pivot] = true;
        return pivot;
    }

    private void Link(int i)
    {
        var d = degree[i];
        lowest = Math.Min(lowest, d);
        previous[i] = -1;
        next[i] = first[d];
        if (next[i] >= 0)
        {
            previous[next[i]] = i;
        }

        first[d] = i;
    }

    private void Unlink(int i)
    {
        if (previous[i] >= 0)
        {
            next[previous[i]] = next[i];
        }
        else
        {
            first[degree[i]] = next[i];
        }

        if (next[i] >= 0)
        {
            previous[next[i]] = previous[i];
        }
    }
}
