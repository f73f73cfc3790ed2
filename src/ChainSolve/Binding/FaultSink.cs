using ChainSolve.Language.Diagnostics;
using ChainSolve.Language.Text;

namespace ChainSolve.Binding;

/// <summary>
/// Collects faults: one a statement or clause, since a second one there is mostly a child of the first, and one a place,
/// since a body that several items share is bound for each.
/// </summary>
/// <param name="source">The text.</param>
/// <param name="unread">The names in statements that could not be read; null where all were.</param>
internal sealed class FaultSink(SourceText source, IReadOnlySet<string>? unread = null)
{
    private const int Most = 20;

    private readonly List<(Fault Fault, object Clause)> faults = [];
    private readonly List<Fault> warnings = [];
    private object clause = new();
    private string prefix = "";

    public SourceText Source => source;

    public bool HasFaults => faults.Count > 0;

    /// <summary>Names the statement or clause that following faults belong to.</summary>
    /// <param name="key">The statement or clause.</param>
    /// <param name="context">What messages begin with, such as the item that is bound; may be empty.</param>
    public void Enter(object key, string context = "")
    {
        clause = key;
        prefix = context;
    }

    /// <summary>Names a line inside the clause; what messages begin with stays.</summary>
    public void EnterLine(object key) => clause = key;

    public void Report(Fault fault)
    {
        if (unread is not null && MayFollow(fault, unread))
        {
            return;
        }

        faults.Add((fault with { Message = prefix + fault.Message }, clause));
    }

    public void Warn(Fault warning) => warnings.Add(warning);

    /// <summary>The faults as told to people, or the warnings where there is no fault.</summary>
    /// <param name="unitUses">How many units the text has.</param>
    /// <param name="firstUnit">The first of them; null where there is none.</param>
    public IReadOnlyList<Diagnostic> Finish(int unitUses, TextSpan? firstUnit)
    {
        var (told, severity) = faults.Count > 0
            ? (Shorten(Told(unitUses, firstUnit), BindingFaults.MoreFaults), Severity.Fault)
            : (Shorten([.. warnings.OrderBy(w => w.Span.Start)], BindingFaults.MoreWarnings), Severity.Warning);
        return [.. told.Select(f => f.ToDiagnostic(source, severity))];
    }

    /// <summary>Whether a fault may only be there because a statement could not be read.</summary>
    private bool MayFollow(Fault fault, IReadOnlySet<string> names) => fault.Code switch
    {
        BindingCodes.UnknownName or BindingCodes.UnknownFunction => names.Contains(source.Slice(fault.Span)),
        BindingCodes.NothingToModel or BindingCodes.NoStates => true,
        _ => false,
    };

    private List<Fault> Told(int unitUses, TextSpan? firstUnit) =>
        [.. FoldMissingUnits([.. faults], unitUses, firstUnit)
            .OrderBy(f => f.Fault.Span.Start)
            .DistinctBy(f => f.Clause, ReferenceEqualityComparer.Instance)
            .Select(f => f.Fault)
            .DistinctBy(f => (f.Code, f.Span))];

    // A lone unit against many bare numbers: either it is one too many or all others are missing.
    private static List<(Fault Fault, object Clause)> FoldMissingUnits(
        List<(Fault Fault, object Clause)> all, int unitUses, TextSpan? firstUnit)
    {
        var bare = all.Where(f => f.Fault.LacksUnit).DistinctBy(f => f.Fault.Span).Count();
        if (firstUnit is not { } at || bare < 3 || bare < 3 * unitUses)
        {
            return all;
        }

        all.RemoveAll(f => f.Fault.LacksUnit);
        all.Add((BindingFaults.UnitsMissing(at, unitUses, bare), new object()));
        return all;
    }

    private static List<Fault> Shorten(List<Fault> all, Func<int, TextSpan, Fault> more) =>
        all.Count <= Most ? all : [.. all.Take(Most), more(all.Count - Most, all[Most].Span)];
}
