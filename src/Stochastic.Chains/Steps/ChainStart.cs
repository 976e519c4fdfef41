using Stochastic.Chains.Internal;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>A chain together with where it starts: one state, or shares of several.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// ChainStart&lt;string&gt; stock = chain.StartingIn(Distribution.FromWeights(chain.States, ("clean", 1200), ("dirty", 310)));
/// var inFourWeeks = stock.After(4);
/// </code>
/// </example>
public sealed class ChainStart<TState>
    where TState : notnull
{
    internal ChainStart(Chain<TState> chain, Distribution<TState> distribution)
    {
        Chain = chain;
        Distribution = distribution;
    }

    /// <summary>Gets the chain.</summary>
    public Chain<TState> Chain { get; }

    /// <summary>Gets where it starts.</summary>
    public Distribution<TState> Distribution { get; }

    /// <summary>Finds where things stand after a number of steps.</summary>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <returns>The distribution with its certificate.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative, or more than 2³⁰ of them change something each.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates; ask <see cref="AfterTime(double)"/>.</exception>
    /// <remarks>
    /// One multiplication of the distribution with the chain for each step: O(transitions) a step, and no power of the matrix is
    /// formed. Stops early, with the same answer, when a step changes nothing any more.
    /// </remarks>
    /// <example><code>double washed = chain.StartingIn("dirty").After(4)["clean"];</code></example>
    public StepDistribution<TState> After(long steps) => After(steps, new SolveOptions());

    /// <summary>Finds where things stand after a number of steps, with options.</summary>
    /// <param name="steps">The number of steps, 0 or more.</param>
    /// <param name="options">Evidence, cancellation and progress.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of steps is negative.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public StepDistribution<TState> After(long steps, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (steps < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(steps), steps, Messages.NegativeSteps(steps));
        }

        return Propagation<TState>.Run(this, steps, options);
    }

    /// <summary>Finds where things stand at every step up to a horizon, and holds it all.</summary>
    /// <param name="horizon">The last step, 0 or more.</param>
    /// <returns>The distributions from step 0 to the horizon, with a certificate that holds for each.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed; <see cref="StepByStep(long)"/> holds nothing.</exception>
    /// <remarks>One multiplication for each step: O(transitions) a step.</remarks>
    /// <example><code>Forecast&lt;string&gt; quarter = chain.StartingIn("dirty").Forecast(13);</code></example>
    public Forecast<TState> Forecast(int horizon) => Forecast(horizon, new SolveOptions());

    /// <summary>Finds where things stand at every step up to a horizon, and holds it all, with options.</summary>
    /// <param name="horizon">The last step, 0 or more.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed; <see cref="StepByStep(long)"/> holds nothing.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public Forecast<TState> Forecast(int horizon, SolveOptions options) =>
        Chains.Forecast<TState>.Hold(Chain.States, horizon, StepByStep(horizon, options), options);

    /// <summary>Goes through where things stand, step by step, and holds nothing: each distribution is computed when it is asked for.</summary>
    /// <param name="horizon">The last step, 0 or more.</param>
    /// <returns>The distributions at steps 0, 1, … up to the horizon.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <example>
    /// <code>
    /// var firstHalfEmpty = chain.StartingIn("full").StepByStep(1000).First(then =&gt; then["empty"] &gt; 0.5).Steps;
    /// </code>
    /// </example>
    public IEnumerable<StepDistribution<TState>> StepByStep(long horizon) => StepByStep(horizon, new SolveOptions());

    /// <summary>Goes through where things stand, step by step, and holds nothing, with options.</summary>
    /// <param name="horizon">The last step, 0 or more.</param>
    /// <param name="options">Evidence and cancellation.</param>
    /// <exception cref="ArgumentOutOfRangeException">The horizon is negative.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled; thrown while the steps are read.</exception>
    public IEnumerable<StepDistribution<TState>> StepByStep(long horizon, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return horizon >= 0
            ? Propagation<TState>.Stream(Distribution, Propagation<TState>.Repeat(Chain, horizon), options)
            : throw new ArgumentOutOfRangeException(nameof(horizon), horizon, Messages.NegativeSteps(horizon));
    }

    /// <summary>
    /// Finds where things stand after one step of each of several chains in turn, as when the probabilities change with the season. The chain of the
    /// start itself plays no part.
    /// </summary>
    /// <param name="periods">The chain of each period, all over the states of the start, in the same order.</param>
    /// <returns>The distribution after as many steps as there are chains, with its certificate.</returns>
    /// <exception cref="ArgumentException">A chain is null or over other states; the message names the state.</exception>
    /// <remarks>An inhomogeneous chain: the distribution times the product of the matrices, which is never formed. O(transitions) a step.</remarks>
    /// <example><code>var inAYear = summer.StartingIn("clean").Through([.. Enumerable.Repeat(summer, 26), .. Enumerable.Repeat(winter, 26)]);</code></example>
    public StepDistribution<TState> Through(IEnumerable<Chain<TState>> periods) => Through(periods, new SolveOptions());

    /// <summary>Finds where things stand after one step of each of several chains in turn, with options.</summary>
    /// <param name="periods">The chain of each period, all over the states of the start, in the same order.</param>
    /// <param name="options">Evidence and cancellation.</param>
    /// <exception cref="ArgumentException">A chain is null or over other states; the message names the state.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public StepDistribution<TState> Through(IEnumerable<Chain<TState>> periods, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(periods);
        ArgumentNullException.ThrowIfNull(options);
        return Propagation<TState>.Through(Distribution, periods, options);
    }

    /// <summary>Finds where things stand at every step while each step is made with a chain of its own, and holds it all.</summary>
    /// <param name="periods">The chain of each period, all over the states of the start, in the same order.</param>
    /// <returns>The distributions from step 0 to the number of chains.</returns>
    /// <exception cref="ArgumentException">A chain is null or over other states; the message names the state.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed.</exception>
    /// <example><code>var year = summer.StartingIn("clean").ForecastThrough([.. Enumerable.Repeat(summer, 26), .. Enumerable.Repeat(winter, 26)]);</code></example>
    public Forecast<TState> ForecastThrough(IEnumerable<Chain<TState>> periods) => ForecastThrough(periods, new SolveOptions());

    /// <summary>Finds where things stand at every step while each step is made with a chain of its own, and holds it all, with options.</summary>
    /// <param name="periods">The chain of each period, all over the states of the start, in the same order.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ArgumentException">A chain is null or over other states; the message names the state.</exception>
    /// <exception cref="MemoryLimitException">The forecast takes more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public Forecast<TState> ForecastThrough(IEnumerable<Chain<TState>> periods, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(periods);
        ArgumentNullException.ThrowIfNull(options);
        var chains = periods.ToList();
        return Chains.Forecast<TState>.Hold(Chain.States, chains.Count, Propagation<TState>.Stream(Distribution, chains, options), options);
    }

    /// <summary>Finds where things stand after a time, for a chain that was made from rates.</summary>
    /// <param name="time">The time in the unit of the rates, 0 or more.</param>
    /// <returns>The distribution with its certificate.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The time is not a finite number of 0 or more, or would take more than 2³⁰ steps of the uniformized chain.</exception>
    /// <exception cref="InvalidOperationException">The chain was given per step and has no unit of time.</exception>
    /// <remarks>
    /// Uniformization (Jensen 1953): the distributions after 0, 1, 2, … steps, each with the Poisson probability of so many steps in the time, found
    /// from the mode outwards so that nothing under- or overflows (Fox and Glynn 1988). Terms are left out only where they are small beside the
    /// smallest probability, so rare states keep their digits. About t + 10 √t steps of O(transitions) for t times the
    /// <see cref="Chain{TState}.UniformizationRate"/>; fewer when the chain settles before.
    /// </remarks>
    /// <example><code>double available = plant.StartingIn("both run").AfterTime(24)["both run"];</code></example>
    public TimeDistribution<TState> AfterTime(double time) => AfterTime(time, new SolveOptions());

    /// <summary>Finds where things stand after a time, for a chain that was made from rates, with options.</summary>
    /// <param name="time">The time in the unit of the rates, 0 or more.</param>
    /// <param name="options">Evidence, cancellation and progress.</param>
    /// <exception cref="ArgumentOutOfRangeException">The time is not a finite number of 0 or more, or would take more than 2³⁰ steps of the uniformized chain.</exception>
    /// <exception cref="InvalidOperationException">The chain was given per step and has no unit of time.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public TimeDistribution<TState> AfterTime(double time, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return AfterTimeSolve<TState>.Run(this, [time], options, nameof(time))[0];
    }

    /// <summary>Finds where things stand after each of several times, for a chain that was made from rates, in one run.</summary>
    /// <param name="times">The times in the unit of the rates, each 0 or more, in any order.</param>
    /// <returns>One distribution for each time, in the order given.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A time is not a finite number of 0 or more, or would take more than 2³⁰ steps of the uniformized chain.</exception>
    /// <exception cref="InvalidOperationException">The chain was given per step and has no unit of time.</exception>
    /// <exception cref="MemoryLimitException">The distributions take more memory than allowed.</exception>
    /// <remarks>As many steps as the longest time takes alone; see <see cref="AfterTime(double)"/>.</remarks>
    /// <example><code>var days = plant.StartingIn("both run").AfterTimes([24, 48, 72]);</code></example>
    public IReadOnlyList<TimeDistribution<TState>> AfterTimes(IEnumerable<double> times) => AfterTimes(times, new SolveOptions());

    /// <summary>Finds where things stand after each of several times, for a chain that was made from rates, in one run, with options.</summary>
    /// <param name="times">The times in the unit of the rates, each 0 or more, in any order.</param>
    /// <param name="options">Evidence, cancellation, progress and memory.</param>
    /// <exception cref="ArgumentOutOfRangeException">A time is not a finite number of 0 or more, or would take more than 2³⁰ steps of the uniformized chain.</exception>
    /// <exception cref="InvalidOperationException">The chain was given per step and has no unit of time.</exception>
    /// <exception cref="MemoryLimitException">The distributions take more memory than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public IReadOnlyList<TimeDistribution<TState>> AfterTimes(IEnumerable<double> times, SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(times);
        ArgumentNullException.ThrowIfNull(options);
        var all = times.ToList();
        options.RequireMemory(Chain.StateCount, 2L * sizeof(double) * all.Count * Chain.StateCount);
        return AfterTimeSolve<TState>.Run(this, all, options, nameof(times));
    }

    /// <summary>A small table of the start, the same in every culture.</summary>
    public override string ToString() => Distribution.ToString();
}
