namespace ChainSolve.Tests.Shared.Checks;

/// <summary>A value with an absolute error bound; arithmetic carries the bound and its own rounding.</summary>
internal readonly record struct Bounded(double Value, double Bound)
{
    private const double Unit = 1.2e-16;

    public static implicit operator Bounded(double exact) => new(exact, 0);

    public static Bounded Relative(double value, double relative) => new(value, Math.Abs(value) * relative);

    public static Bounded operator +(Bounded a, Bounded b) => Rounded(a.Value + b.Value, a.Bound + b.Bound);

    public static Bounded operator -(Bounded a, Bounded b) => Rounded(a.Value - b.Value, a.Bound + b.Bound);

    public static Bounded operator *(Bounded a, Bounded b) =>
        Rounded(a.Value * b.Value, (Math.Abs(a.Value) * b.Bound) + (Math.Abs(b.Value) * a.Bound) + (a.Bound * b.Bound));

    public static Bounded operator /(Bounded a, Bounded b)
    {
        var quotient = a.Value / b.Value;
        return Rounded(quotient, (a.Bound + (Math.Abs(quotient) * b.Bound)) / (Math.Abs(b.Value) - b.Bound));
    }

    private static Bounded Rounded(double value, double bound) => new(value, (bound * (1 + (4 * Unit))) + (Math.Abs(value) * Unit));
}
