using ChainSolve.Language.Syntax;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>Binds what stands over a model: its title and its unit of time.</summary>
internal sealed class HeadingBinder(ModelSyntax syntax, FaultSink sink)
{
    public string? Title() => Only<TitleSyntax>("model")?.Title;

    /// <param name="hasUnits">Whether any number of the text has a unit.</param>
    /// <param name="isPartial">Whether parts of the text are missing, which may have units.</param>
    public TimeBase TimeBase(bool hasUnits, bool isPartial)
    {
        if (Only<TimebaseSyntax>("timebase") is not { } statement)
        {
            return hasUnits ? Modelling.TimeBase.Hour : Modelling.TimeBase.None;
        }

        sink.Enter(statement);
        if (UnitScale.TimeBaseOf(statement.Unit.Text) is not { } timeBase)
        {
            sink.Report(BindingFaults.TimebaseUnknown(statement.Unit));
            return hasUnits ? Modelling.TimeBase.Hour : Modelling.TimeBase.None;
        }

        if (hasUnits)
        {
            return timeBase;
        }

        if (!isPartial)
        {
            sink.Report(BindingFaults.TimebaseUnitless(statement.Unit));
        }

        return Modelling.TimeBase.None;
    }

    private T? Only<T>(string word)
        where T : StatementSyntax
    {
        var all = syntax.Statements.OfType<T>().ToList();
        foreach (var further in all.Skip(1))
        {
            sink.Enter(further);
            sink.Report(BindingFaults.StatementTwice(word, further.Span, syntax.Source.PositionOf(all[0].Span.Start).Line));
        }

        return all.FirstOrDefault();
    }
}
