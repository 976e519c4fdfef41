using System.Diagnostics;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>How many items to expect in each state at every step from now to a horizon, and how far the numbers scatter.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The certificate bounds the error of each expected number; its residual is the largest relative difference between those that ever came and
/// those present or lost. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// PopulationForecast&lt;string&gt; quarter = pool.StartingWith(("clean", 1200), ("dirty", 310)).Forecast(13);
/// double clean = quarter.Expected(4, "clean");
/// long surelyClean = quarter.Count("clean", 4).Quantile(0.05);
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class PopulationForecast<TState> : ICertified
    where TState : notnull
{
    private readonly Population<TState> _population;
    private readonly Chain<TState>[] _chains;
    private readonly double[] _expected;
    private readonly double[] _losses;

    internal PopulationForecast(Population<TState> population, Chain<TState>[] chains, double[] expected, double[] losses, Certificate certificate)
    {
        _population = population;
        _chains = chains;
        _expected = expected;
        _losses = losses;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of the columns of <see cref="Values"/>.</summary>
    public StateSpace<TState> States => _population.Chain.States;

    /// <summary>Gets the last step of the forecast.</summary>
    public int Horizon => _chains.Length;

    /// <summary>Gets the expected numbers, row-major: a row for each step from 0 to the horizon, a column for each state.</summary>
    public ReadOnlySpan<double> Values => _expected;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets how many items to expect in a state at a step.</summary>
    /// <param name="state">One of the states.</param>
    /// <param name="step">A step from 0 to <see cref="Horizon"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The step is outside the forecast.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public double Expected(TState state, int step) => _expected[(Checked(step) * States.Count) + States.Require(state)];

    /// <summary>Lists how many items to expect in one state, step by step from 0 to the horizon.</summary>
    /// <param name="state">One of the states.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public IReadOnlyList<double> Of(TState state)
    {
        var column = States.Require(state);
        return [.. Enumerable.Range(0, Horizon + 1).Select(step => _expected[(step * States.Count) + column])];
    }

    /// <summary>Gets how many items are expected to have left up to a step by the losses of the population. Those in absorbing states have not left.</summary>
    /// <param name="step">A step from 0 to <see cref="Horizon"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The step is outside the forecast.</exception>
    public double Losses(int step) => _losses[Checked(step)];

    /// <summary>Finds the standard deviation of the number in a state at a step, when items move independently.</summary>
    /// <param name="state">One of the states.</param>
    /// <param name="step">A step from 0 to <see cref="Horizon"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The step is outside the forecast.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    /// <remarks>One pass backwards over the steps: O(transitions) a step.</remarks>
    public double StandardDeviation(TState state, int step) => Math.Sqrt(PopulationCount.Variance(Groups(step, state, CancellationToken.None)));

    /// <summary>Finds the probabilities of the number in a state at a step, when items move independently.</summary>
    /// <param name="state">One of the states.</param>
    /// <param name="step">A step from 0 to <see cref="Horizon"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The step is outside the forecast.</exception>
    /// <exception cref="InvalidOperationException">More than ten million items can be in the state.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    /// <remarks>
    /// A sum of independent yes-or-no items, in groups of equal probability: a convolution of binomial laws, without any approximation by a normal
    /// law. One pass backwards over the steps, then about the product of the widths of the laws, each about 20 standard deviations wide.
    /// </remarks>
    /// <example><code>double tooFew = quarter.Count("clean", 4).AtMost(399);</code></example>
    public CountDistribution Count(TState state, int step) => Count(state, step, new SolveOptions());

    /// <summary>Finds the probabilities of the number in a state at a step, when items move independently, with options.</summary>
    /// <param name="state">One of the states.</param>
    /// <param name="step">A step from 0 to <see cref="Horizon"/>.</param>
    /// <param name="options">Evidence and cancellation.</param>
    /// <exception cref="ArgumentOutOfRangeException">The step is outside the forecast.</exception>
    /// <exception cref="InvalidOperationException">More than ten million items can be in the state.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public CountDistribution Count(TState state, int step, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return PopulationCount.Of(Groups(step, state, options.CancellationToken), options);
    }

    /// <summary>A table of some steps and states, the same in every culture; of many states those with the largest numbers.</summary>
    public override string ToString() => ForecastText.Write(States, _expected, Horizon, "#,0.#");

    private List<PopulationGroup> Groups(int step, TState state, CancellationToken cancellation) =>
        PopulationSolve<TState>.Groups(_population, _chains, Checked(step), States.Require(state), cancellation);

    private int Checked(int step) => step >= 0 && step <= Horizon
        ? step
        : throw new ArgumentOutOfRangeException(nameof(step), step, Messages.StepOutOfForecast(step, Horizon));
}
