using ChainSolve.Numerics.Absorption;
using ChainSolve.Numerics.Estimates;
using ChainSolve.Numerics.Iteration;
using ChainSolve.Numerics.Operators;
using ChainSolve.Numerics.Stationary;
using ChainSolve.Numerics.Structure;
using ChainSolve.Numerics.Transient;

namespace ChainSolve.Numerics;

/// <summary>
/// A continuous-time Markov chain and the questions that are asked of it, for programs that build their chains
/// themselves. Every answer comes with a bound on its error.
/// </summary>
/// <remarks>
/// Immutable; safe to share between threads. Methods are chosen from size and structure unless named. Times are in the
/// unit in which the rates are given. Every call takes a <see cref="SolveContext"/> for cancellation and progress, throws
/// <see cref="ArgumentException"/> for arguments that do not fit the chain, <see cref="NotConvergedException"/> where no
/// method gave a value, and <see cref="OperationCanceledException"/> when cancelled.
/// </remarks>
/// <example>
/// <code>
/// var chain = new MarkovChain(new GeneratorBuilder(2).Add(0, 1, 1e-3).Add(1, 0, 0.1).Build());
/// Estimate availability = chain.LongRun(chain.StartAt(0)).Probability([true, false]);
/// </code>
/// </example>
public sealed class MarkovChain
{
    private readonly Lazy<ChainClasses> classes;

    /// <summary>Wraps a generator.</summary>
    /// <param name="generator">The chain.</param>
    public MarkovChain(Generator generator)
    {
        ArgumentNullException.ThrowIfNull(generator);
        Generator = generator;
        classes = new Lazy<ChainClasses>(() => ChainClasses.Of(generator));
    }

    /// <summary>The rates.</summary>
    public Generator Generator { get; }

    /// <summary>The number of states.</summary>
    public int StateCount => Generator.StateCount;

    /// <summary>The recurrent classes and the transient states. Found on first use.</summary>
    public ChainClasses Classes => classes.Value;

    /// <summary>The start distribution that is certain of one state: a new array.</summary>
    /// <param name="state">The state, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such state.</exception>
    public double[] StartAt(int state)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(state);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(state, StateCount);
        var start = new double[StateCount];
        start[state] = 1;
        return start;
    }

    /// <summary>The distribution at a time.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="time">The time, finite and not negative.</param>
    /// <param name="method">The name of the transient method; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <returns>One probability a state; exactly 0 where a state cannot be reached.</returns>
    public Estimate[] Distribution(double[] start, double time, string? method = null, SolveContext? context = null) =>
        Distributions(start, [time], method, context)[0];

    /// <summary>The distributions at several times, from one pass.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="times">The times in any order, finite and not negative.</param>
    /// <param name="method">The name of the transient method; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <returns>By time: one probability a state.</returns>
    public IReadOnlyList<Estimate[]> Distributions(
        double[] start, IReadOnlyList<double> times, string? method = null, SolveContext? context = null)
    {
        // The sum over all states tells whether the method proves its bounds.
        var all = new double[StateCount];
        Array.Fill(all, 1);
        var result = Solve(Problem(start, times) with { WantsDistributions = true, Rates = [all] }, method, context);
        return [.. times.Select((_, t) => result.Distributions![t]
            .Select((p, i) => new Estimate(p, result.DistributionBounds![t][i], result.Rates[t][0].IsProved)).ToArray())];
    }

    /// <summary>The matrix of all probabilities to be in one state at a time, having started in another.</summary>
    /// <param name="time">The time, finite and not negative.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <remarks>For chains of up to <see cref="Transient.TransitionMatrix.MaxStates"/> states.</remarks>
    public TransitionMatrix TransitionMatrix(double time, SolveContext? context = null) =>
        Numerics.Transient.TransitionMatrix.Compute(Generator, time, context);

    /// <summary>The expected value of a reward at each of several times.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="rewards">One finite reward a state; may be negative. 1 and 0 ask for the probability of a set.</param>
    /// <param name="times">The times in any order, finite and not negative.</param>
    /// <param name="method">The name of the transient method; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    public IReadOnlyList<Estimate> ExpectedReward(
        double[] start, double[] rewards, IReadOnlyList<double> times, string? method = null, SolveContext? context = null)
    {
        var result = Solve(Problem(start, times) with { Rates = Split(rewards) }, method, context);
        return [.. result.Rates.Select(Net)];
    }

    /// <summary>The expected total of a reward from 0 to each of several times.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="rewards">One finite reward a state and unit of time; may be negative.</param>
    /// <param name="times">The times in any order, finite and not negative.</param>
    /// <param name="method">The name of the transient method; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    public IReadOnlyList<Estimate> TotalReward(
        double[] start, double[] rewards, IReadOnlyList<double> times, string? method = null, SolveContext? context = null)
    {
        var result = Solve(Problem(start, times) with { Totals = Split(rewards) }, method, context);
        return [.. result.Totals.Select(Net)];
    }

    /// <summary>The probability of not having entered a set of states up to each of several times.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="target">True for the states of the set.</param>
    /// <param name="times">The times in any order, finite and not negative.</param>
    /// <param name="method">The name of the transient method; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    public IReadOnlyList<Estimate> Survival(
        double[] start, bool[] target, IReadOnlyList<double> times, string? method = null, SolveContext? context = null)
    {
        var alive = Others(target);
        var result = Solve(
            Problem(start, times) with { Alive = alive, Rates = [Array.ConvertAll(alive, a => a ? 1.0 : 0.0)] }, method, context);
        return [.. result.Rates.Select(r => r[0])];
    }

    /// <summary>The stationary vector of a chain in which every state can be reached from every other.</summary>
    /// <param name="options">Which method to use; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    /// <exception cref="InvalidOperationException">The chain has transient states or several classes; ask <see cref="LongRun"/> with a start.</exception>
    public StationaryVector Stationary(SolverOptions? options = null, SolveContext? context = null)
    {
        if (!Classes.IsIrreducible)
        {
            throw new InvalidOperationException(
                $"The chain has {Classes.Recurrent.Count} recurrent classes and {Classes.Transient.Length} transient states. " +
                "Its long run depends on the start: ask LongRun.");
        }

        return Attempts.First(
            StationarySolvers.Rank(Generator, options?.Stationary, options?.StationarySolvers),
            s => s.Solve(Generator, context ?? SolveContext.Default),
            s => s.Name).Result;
    }

    /// <summary>What the chain does in the long run, whatever its structure.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1.</param>
    /// <param name="options">Which methods to use; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    public LongRunResult LongRun(double[] start, SolverOptions? options = null, SolveContext? context = null) =>
        Numerics.Stationary.LongRun.Solve(Generator, start, options, context);

    /// <summary>The first time at which a set of states is entered: moments, chances, and what is earned until then.</summary>
    /// <param name="start">The start distribution: one probability a state, adding to 1. Mass in the set has time 0.</param>
    /// <param name="target">True for the states of the set.</param>
    /// <param name="highestMoment">The highest moment that will be asked, 1 to 4; the variance needs 2.</param>
    /// <param name="options">Which method to use; null to choose.</param>
    /// <param name="context">Cancellation, progress and accuracy; null for the default.</param>
    public FirstPassage FirstPassage(
        double[] start, bool[] target, int highestMoment = 1, SolverOptions? options = null, SolveContext? context = null) =>
        Absorption.FirstPassage.Solve(Generator, start, Others(target), highestMoment, options, context);

    private static Estimate Net(Estimate[] parts) => parts.Length == 1 ? parts[0] : parts[0] - parts[1];

    private static TransientResult Solve(TransientProblem problem, string? method, SolveContext? context) => Attempts.First(
        TransientSolvers.Rank(problem, method, null), s => s.Solve(problem, context ?? SolveContext.Default), s => s.Name).Result;

    private TransientProblem Problem(double[] start, IReadOnlyList<double> times)
    {
        StartCheck.Distribution(Generator, start, nameof(start));
        ArgumentNullException.ThrowIfNull(times);
        return new TransientProblem { Generator = Generator, Start = start, Times = times };
    }

    /// <summary>A reward as a non-negative part and, where needed, the part to be taken off.</summary>
    private IReadOnlyList<double[]> Split(double[] rewards)
    {
        StartCheck.Length(Generator, rewards, nameof(rewards));
        var gain = Array.ConvertAll(rewards, r => r < 0 ? 0 : r);
        return Array.Exists(rewards, r => r < 0) ? [gain, Array.ConvertAll(rewards, r => r < 0 ? -r : 0)] : [gain];
    }

    private bool[] Others(bool[] target)
    {
        StartCheck.Length(Generator, target, nameof(target));
        return Array.ConvertAll(target, t => !t);
    }
}
