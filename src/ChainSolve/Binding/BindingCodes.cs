using ChainSolve.Language.Diagnostics;

namespace ChainSolve.Binding;

/// <summary>The codes of faults (B2xx) and warnings (B3xx) of the meaning of a model. A code is never used again for something else.</summary>
internal static class BindingCodes
{
    public const string DeclaredTwice = "B201";
    public const string StatementTwice = "B202";
    public const string NothingToModel = "B203";
    public const string UnknownName = "B204";
    public const string WrongKind = "B205";
    public const string UnknownState = "B206";
    public const string UnknownMove = "B207";
    public const string UnknownFunction = "B208";
    public const string ArgumentCount = "B209";
    public const string Cycle = "B210";
    public const string GivenNotAbove = "B211";
    public const string ReadsState = "B212";
    public const string IsOnReplicas = "B213";
    public const string TooManyCalls = "B214";
    public const string NotACondition = "B220";
    public const string NotANumber = "B221";
    public const string BranchesDiffer = "B222";
    public const string UnlikeDimensions = "B230";
    public const string WrongDimension = "B231";
    public const string UnitsMissing = "B232";
    public const string UnitMisused = "B233";
    public const string Timebase = "B234";
    public const string PowerOfDimension = "B235";
    public const string NoStates = "B240";
    public const string StateTwice = "B241";
    public const string StartNumbers = "B242";
    public const string TargetNumbers = "B243";
    public const string Rank = "B244";
    public const string AfterTwice = "B245";
    public const string CountNotWhole = "B246";
    public const string StartSum = "B247";
    public const string TargetSum = "B248";
    public const string AssignedTwice = "B250";
    public const string AllTwice = "B251";
    public const string CounterRange = "B252";
    public const string RewardDimension = "B260";
    public const string RewardEmpty = "B261";
    public const string MeasureForm = "B270";
    public const string NotAnObject = "B271";
    public const string ShareOutOfRange = "B272";
    public const string TimeNegative = "B273";
    public const string TimeStep = "B274";
    public const string TimeLog = "B275";
    public const string TooManyTimes = "B276";
    public const string TimesBackwards = "B277";
    public const string UnknownLaw = "B280";
    public const string LawParameters = "B281";
    public const string OutOfRange = "B282";
    public const string NotFinite = "B283";
    public const string NotWhole = "B284";
    public const string UnknownGiven = "B290";
    public const string SetTwice = "B291";
    public const string UnitWanted = "B292";
    public const string UnitUnwanted = "B293";
    public const string MoreFaults = "B299";
    public const string Unused = "B301";
    public const string SharedRepair = "B302";
    public const string MoreWarnings = "B399";

    /// <summary>Every code with the title of its page.</summary>
    public static IReadOnlyList<DiagnosticCode> All { get; } =
    [
        new(DeclaredTwice, "a name that is declared twice"),
        new(StatementTwice, "a statement or clause that may stand once only"),
        new(NothingToModel, "a file with neither item nor counter"),
        new(UnknownName, "an unknown name"),
        new(WrongKind, "a name of another kind than is needed here"),
        new(UnknownState, "an unknown state"),
        new(UnknownMove, "an unknown move"),
        new(UnknownFunction, "an unknown function"),
        new(ArgumentCount, "a wrong number of arguments"),
        new(Cycle, "lets that lean on each other in a circle"),
        new(GivenNotAbove, "a given that uses something other than givens above it"),
        new(ReadsState, "the state is read where it may not be"),
        new(IsOnReplicas, "'is' for an item with replicas"),
        new(TooManyCalls, "functions that expand too far"),
        new(NotACondition, "a number where a condition is needed"),
        new(NotANumber, "a condition where a number is needed"),
        new(BranchesDiffer, "an 'if' with a number in one branch and a condition in the other"),
        new(UnlikeDimensions, "unlike dimensions"),
        new(WrongDimension, "a dimension that does not fit its place"),
        new(UnitsMissing, "one unit against many bare numbers"),
        new(UnitMisused, "a unit that does not fit its number"),
        new(Timebase, "a time base that cannot be used"),
        new(PowerOfDimension, "a power or root that has no dimension"),
        new(NoStates, "an item without states"),
        new(StateTwice, "a state that is listed twice"),
        new(StartNumbers, "a start that needs numbers"),
        new(TargetNumbers, "targets that need probabilities"),
        new(Rank, "a rank that is missing, not fixed, or out of place"),
        new(AfterTwice, "more than one 'after' out of a state"),
        new(CountNotWhole, "a number of replicas that is not whole"),
        new(StartSum, "a start that does not add up"),
        new(TargetSum, "probabilities of targets that do not add up"),
        new(AssignedTwice, "a counter that is assigned twice in one instant"),
        new(AllTwice, "two lines that move all replicas of one state"),
        new(CounterRange, "a counter whose range or start is not possible"),
        new(RewardDimension, "lines of a reward that do not add up"),
        new(RewardEmpty, "a reward that earns nothing"),
        new(MeasureForm, "a measure in a form that it does not have"),
        new(NotAnObject, "something that cannot be measured as it stands"),
        new(ShareOutOfRange, "a quantile that is not between 0 and 1"),
        new(TimeNegative, "a time that is negative or not finite"),
        new(TimeStep, "a step that is not above 0"),
        new(TimeLog, "a 'log' that cannot be spaced"),
        new(TooManyTimes, "too many times"),
        new(TimesBackwards, "times that run backwards"),
        new(UnknownLaw, "an unknown distribution"),
        new(LawParameters, "parameters that a distribution cannot have"),
        new(OutOfRange, "a value outside its range"),
        new(NotFinite, "a value that is not a finite number"),
        new(NotWhole, "a number of crew members that is not whole"),
        new(UnknownGiven, "a value for an unknown given"),
        new(SetTwice, "a given that is set twice"),
        new(UnitWanted, "a value that needs its unit"),
        new(UnitUnwanted, "a value with a unit for a model without units"),
        new(MoreFaults, "more faults than are shown"),
        new(Unused, "something that nothing uses"),
        new(SharedRepair, "memoryless repairs under a scarce crew"),
        new(MoreWarnings, "more warnings than are shown"),
    ];
}
