namespace ChainSolve.Binding;

/// <summary>A value for a given from outside the model.</summary>
internal sealed record GivenSetting
{
    private GivenSetting(string name, string? text, double number)
    {
        Name = name;
        Text = text;
        Number = number;
    }

    public string Name { get; }

    /// <summary>The value as written, with or without a unit; null where it is a <see cref="Number"/>.</summary>
    public string? Text { get; }

    /// <summary>The value as a number without a unit, read in the unit that ends the given's own expression.</summary>
    public double Number { get; }

    public static GivenSetting Of(string name, string text) => new(name, text, double.NaN);

    public static GivenSetting Of(string name, double number) => new(name, null, number);
}
