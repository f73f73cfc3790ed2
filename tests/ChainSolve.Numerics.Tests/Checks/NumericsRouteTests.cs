using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Transient;
using ChainSolve.Tests.Shared.Checks;
using ChainSolve.Tests.Shared.Reference;

namespace ChainSolve.Numerics.Tests.Checks;

/// <summary>Every value from outside through the solvers, by each method that can take it.</summary>
public class NumericsRouteTests
{
    /// <summary>Stands for the method that the library chooses.</summary>
    private const string Chosen = "chosen";

    private static readonly string[] TransientAsks = ["total", "average", "density"];

    private static readonly string[] AbsorptionAsks = ["mean-time", "moment", "total-until", "ends-in", "conditional-mean-time"];

    // Sweeps gain less than a part in a hundred on these: they give up, or rounding grows beyond the twelfth digit.
    private static readonly string[] SlowForSweeps = ["courtois", "erlC-5-4", "erlC-10-8", "me21-L", "mm1k-100k"];

    public static TheoryData<string, string> TransientCases =>
        Pairs(
            c => c.Ask.At is not null || TransientAsks.Contains(c.Ask.What),
            check => SolverCatalog.Transient.Where(s => s.Cost(TransientProblem(check)) < 1e10).Select(s => s.Name).Append(Chosen));

    public static TheoryData<string, string> StationaryCases =>
        Pairs(
            IsStationary,
            check => SolverCatalog.Stationary.Where(s => IsIrreducible(check) ? s.Cost(Generator(check)) < 1e10 : s.Name.Contains("gth", StringComparison.Ordinal))
                .Where(s => s.Name is not ("gauss-seidel" or "sor" or "bicgstab" or "gmres") || !SlowForSweeps.Any(slow => check.Id.StartsWith(slow, StringComparison.Ordinal)))
                .Select(s => s.Name));

    public static TheoryData<string, string> SlowCases =>
        Pairs(c => IsStationary(c) && SlowForSweeps.Any(slow => c.Id.StartsWith(slow, StringComparison.Ordinal)), _ => ["gauss-seidel", "sor", "bicgstab", "gmres"]);

    public static TheoryData<string, string> AbsorptionCases =>
        Pairs(c => AbsorptionAsks.Contains(c.Ask.What), _ => SolverCatalog.Absorption.Select(s => s.Name));

    [Theory]
    [MemberData(nameof(TransientCases))]
    public void Transient_ACase_HasItsDigits(string id, string method) =>
        Holds(
            id,
            SolverCatalog.Stationary[0],
            SolverCatalog.Absorption[0],
            SolverCatalog.Transient.FirstOrDefault(s => s.Name == method) ?? TransientSolvers.Select(TransientProblem(CheckFiles.Find(id))).Solver);

    [Theory]
    [MemberData(nameof(StationaryCases))]
    public void Stationary_ACase_HasItsDigits(string id, string method) =>
        Holds(id, SolverCatalog.Stationary.First(s => s.Name == method), SolverCatalog.Absorption[0]);

    [Theory]
    [MemberData(nameof(SlowCases))]
    public void Sweeps_ACaseTooSlowForThem_GiveUpOrKnowTheirError(string id, string method)
    {
        var check = CheckFiles.Find(id);
        var solver = SolverCatalog.Stationary.First(s => s.Name == method);
        try
        {
            CheckVerdict.IsWithinItsBound(check, new NumericsAnswers(solver, SolverCatalog.Absorption[0]).Answer(check)!.Value);
        }
        catch (NotConvergedException refusal)
        {
            Assert.NotEmpty(refusal.Message);
        }
    }

    [Theory]
    [MemberData(nameof(AbsorptionCases))]
    public void Absorption_ACase_HasItsDigits(string id, string method) =>
        Holds(id, SolverCatalog.Stationary[0], SolverCatalog.Absorption.First(s => s.Name == method));

    private static bool IsStationary(CheckCase check) =>
        check.Chain is not null && check.Ask is { At: null, Over: null, Share: null } && !AbsorptionAsks.Contains(check.Ask.What);

    private static Generator Generator(CheckCase check) => NumericsAnswers.Build(ConcreteChain.From(check.Chain!));

    /// <summary>Whether the whole chain is one class; a chain with several is solved class by class.</summary>
    private static bool IsIrreducible(CheckCase check)
    {
        var chain = ConcreteChain.From(check.Chain!);
        return chain.Count > 25 || new ReferenceChain(chain.Count, chain.Moves).Reachable().Cast<bool>().All(r => r);
    }

    private static TransientProblem TransientProblem(CheckCase check) => new()
    {
        Generator = Generator(check),
        Start = ConcreteChain.From(check.Chain!).Start,
        Times = [check.Ask.At ?? check.Ask.Over!.Value],
    };

    private static TheoryData<string, string> Pairs(Func<CheckCase, bool> belongs, Func<CheckCase, IEnumerable<string>> methods)
    {
        var pairs = new TheoryData<string, string>();
        foreach (var check in CheckFiles.All.Where(belongs))
        {
            foreach (var method in methods(check))
            {
                pairs.Add(check.Id, method);
            }
        }

        return pairs;
    }

    private static void Holds(string id, IStationarySolver stationary, IAbsorptionSolver absorption, ITransientSolver? transient = null)
    {
        var check = CheckFiles.Find(id);
        CheckVerdict.Holds(check, new NumericsAnswers(stationary, absorption, transient).Answer(check)!.Value);
    }
}
