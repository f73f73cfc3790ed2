namespace ChainSolve.Modelling;

/// <summary>The unit of time of a model.</summary>
/// <param name="Unit">The unit word, such as <c>h</c>; empty for a model without units.</param>
/// <param name="Hours">Its length in hours; 1 for a model without units.</param>
internal sealed record TimeBase(string Unit, double Hours)
{
    /// <summary>The time base of a model that names none.</summary>
    public static TimeBase Hour { get; } = new("h", 1);

    /// <summary>The time base of a model without any unit.</summary>
    public static TimeBase None { get; } = new("", 1);

    public bool IsUnitless => Unit.Length == 0;
}
