using System.Diagnostics;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Steps;

namespace Stochastic.Chains;

/// <summary>Where things stand at every step from now to a horizon.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The certificate holds for every step: its bounds are the largest of any step, its residual the largest |sum of the probabilities − 1|. Takes
/// 8 · (horizon + 1) · states bytes. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// Forecast&lt;string&gt; quarter = pool.StartingIn("dirty").Forecast(13);
/// double cleanInFourWeeks = quarter[4]["clean"];
/// IReadOnlyList&lt;double&gt; lostByWeek = quarter.Of("lost");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class Forecast<TState> : ICertified
    where TState : notnull
{
    private readonly double[] _values;
    private readonly Certificate[] _certificates;

    private Forecast(StateSpace<TState> states, double[] values, Certificate[] certificates)
    {
        States = states;
        _values = values;
        _certificates = certificates;
        Certificate = certificates[^1] with
        {
            Residual = certificates.Max(certificate => certificate.Residual),
            RelativeErrorBound = certificates.Max(certificate => certificate.RelativeErrorBound),
            AbsoluteErrorBound = certificates.Max(certificate => certificate.AbsoluteErrorBound),
            IsProof = Array.TrueForAll(certificates, certificate => certificate.IsProof),
        };
    }

    /// <summary>Gets the states, in the order of the columns of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the last step of the forecast.</summary>
    public int Horizon => _certificates.Length - 1;

    /// <summary>Gets the probabilities, row-major: a row for each step from 0 to the horizon, a column for each state.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets where things stand at a step, with the certificate of that step.</summary>
    /// <param name="step">A step from 0 to <see cref="Horizon"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The step is outside the forecast.</exception>
    public StepDistribution<TState> this[int step] => step >= 0 && step <= Horizon
        ? new StepDistribution<TState>(States, _values[(step * States.Count)..((step + 1) * States.Count)], step, _certificates[step])
        : throw new ArgumentOutOfRangeException(nameof(step), step, Messages.StepOutOfForecast(step, Horizon));

    /// <summary>Lists the probabilities of one state, step by step from 0 to the horizon.</summary>
    /// <param name="state">One of the states.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public IReadOnlyList<double> Of(TState state)
    {
        var column = States.Require(state);
        return [.. Enumerable.Range(0, Horizon + 1).Select(step => _values[(step * States.Count) + column])];
    }

    /// <summary>A table of some steps and states, the same in every culture; of many states those with the largest probabilities.</summary>
    public override string ToString() => ForecastText.Write(States, _values, Horizon, "G4");

    /// <summary>Holds a stream of distributions from step 0 on.</summary>
    internal static Forecast<TState> Hold(StateSpace<TState> states, int horizon, IEnumerable<StepDistribution<TState>> stream, SolveOptions options)
    {
        options.RequireMemory(states.Count, sizeof(double) * (horizon + 1L) * states.Count);
        var values = new double[(horizon + 1) * states.Count];
        var certificates = new Certificate[horizon + 1];
        var report = options.Report("steps");
        foreach (var distribution in stream)
        {
            var step = (int)distribution.Steps;
            distribution.Values.CopyTo(values.AsSpan(step * states.Count));
            certificates[step] = distribution.Certificate;
            report?.Invoke((step + 1.0) / (horizon + 1));
        }

        return new Forecast<TState>(states, values, certificates);
    }
}
