namespace ChainSolve.Numerics.Timeline;

/// <summary>
/// Segments of time one after the other, each with its own constant generator, and the jumps between them. A chain with
/// one generator for all time is the case of one segment.
/// </summary>
/// <remarks>Immutable; safe to share between threads.</remarks>
public sealed class Course
{
    private readonly double[] begins;

    /// <summary>Makes a course.</summary>
    /// <param name="segments">At least one; durations are positive, and only the last may be infinite.</param>
    /// <param name="jumps">
    /// What happens between each segment and the next, one fewer than there are segments; null where the chain goes on in
    /// the state it is in. Empty for no jumps at all.
    /// </param>
    /// <exception cref="ArgumentException">The parts do not fit together; the message says which.</exception>
    public Course(IReadOnlyList<Segment> segments, IReadOnlyList<Jump?> jumps)
    {
        ArgumentNullException.ThrowIfNull(segments);
        ArgumentNullException.ThrowIfNull(jumps);
        if (segments.Count == 0)
        {
            throw new ArgumentException("A course has at least one segment.", nameof(segments));
        }

        if (jumps.Count != segments.Count - 1 && jumps.Count > 0)
        {
            throw new ArgumentException($"{segments.Count} segments need {segments.Count - 1} jumps between them, not {jumps.Count}.", nameof(jumps));
        }

        Segments = [.. segments];
        Jumps = jumps.Count > 0 ? [.. jumps] : new Jump?[segments.Count - 1];
        begins = new double[segments.Count + 1];
        for (var k = 0; k < Segments.Count; k++)
        {
            var duration = Segments[k].Duration;
            if (!(duration > 0) || (double.IsInfinity(duration) && k < Segments.Count - 1))
            {
                throw new ArgumentException($"Segment {k} lasts {duration}; a duration is positive, and only the last is infinite.", nameof(segments));
            }

            begins[k + 1] = begins[k] + duration;
            if (k < Segments.Count - 1)
            {
                CheckJump(k);
            }
        }
    }

    /// <summary>The segments in their order.</summary>
    public IReadOnlyList<Segment> Segments { get; }

    /// <summary>The jump after each segment but the last; null where the state stays.</summary>
    public IReadOnlyList<Jump?> Jumps { get; }

    /// <summary>When the last segment ends; infinite where it does not.</summary>
    public double End => begins[^1];

    /// <summary>When a segment begins.</summary>
    /// <param name="segment">The position of the segment.</param>
    public double Begin(int segment)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(segment);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(segment, Segments.Count);
        return begins[segment];
    }

    /// <summary>The segment that a time falls in, and the time since it began. At an instant of a jump the jump has happened.</summary>
    /// <param name="time">From 0 to <see cref="End"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The time is outside of the course.</exception>
    public (int Segment, double Since) Find(double time)
    {
        if (!(time >= 0) || time > End)
        {
            throw new ArgumentOutOfRangeException(nameof(time), time, $"The course runs from 0 to {End}.");
        }

        var at = Array.BinarySearch(begins, 0, Segments.Count, time);
        var segment = at >= 0 ? at : ~at - 1;
        return (segment, time - begins[segment]);
    }

    private void CheckJump(int segment)
    {
        var (before, after) = (Segments[segment].Generator.StateCount, Segments[segment + 1].Generator.StateCount);
        if (Jumps[segment] is { } jump)
        {
            if (jump.SourceCount != before || jump.TargetCount != after)
            {
                throw new ArgumentException(
                    $"The jump after segment {segment} leads from {jump.SourceCount} to {jump.TargetCount} states; the segments have {before} and {after}.");
            }
        }
        else if (before != after)
        {
            throw new ArgumentException($"Segments {segment} and {segment + 1} have {before} and {after} states; a jump must say how they correspond.");
        }
    }
}
