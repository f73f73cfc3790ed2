using ChainSolve.Language.Text;
using ChainSolve.Modelling;

namespace ChainSolve.Binding;

/// <summary>What all parts of the binder share.</summary>
/// <param name="Source">The text that spans refer to.</param>
/// <param name="Sink">Where faults go.</param>
/// <param name="TimeBase">The model's unit of time.</param>
internal sealed record BindContext(SourceText Source, FaultSink Sink, TimeBase TimeBase)
{
    public string Quote(TextSpan span) => SourceWords.Quote(Source, span);

    public void Report(Fault fault) => Sink.Report(fault);
}
