using System.Collections;
using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>How much the time until something first happens varies: mean, variance, standard deviation and third moment by start.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Times are counted in steps, or in the unit of the rates when the chain was made from rates. Where the mean is infinite, so is
/// everything else. The certificate bounds the errors of the standard deviations, its relative bound those of the variances as well; its residual
/// is that of the equations of the third moments, which are made from both and carry no bound of their own. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// PassageMoments&lt;string&gt; moments = pump.TimeTo("failed").Moments();
/// double give = moments.StandardDeviation("new");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
[SuppressMessage("Naming", "CA1710", Justification = "That it enumerates is a convenience.")]
public sealed class PassageMoments<TState> : ICertified, IEnumerable<KeyValuePair<TState, double>>
    where TState : notnull
{
    private readonly double[] _means;
    private readonly ScaledDoubleDouble[] _variances;
    private readonly ScaledDoubleDouble[] _thirdMoments;
    private readonly double[] _deviations;

    internal PassageMoments(
        StateSpace<TState> states, double[] means, ScaledDoubleDouble[] variances, ScaledDoubleDouble[] thirdMoments, Certificate certificate)
    {
        States = states;
        Certificate = certificate;
        _means = means;
        _variances = variances;
        _thirdMoments = thirdMoments;
        _deviations = [.. means.Select((mean, state) => double.IsFinite(mean) ? variances[state].SquareRoot() : double.PositiveInfinity)];
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the standard deviations in state order.</summary>
    public ReadOnlySpan<double> Values => _deviations;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean time.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double Mean(TState from) => _means[States.Require(from)];

    /// <summary>Gets the standard deviation of the time. Never out of range where the mean is not.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double StandardDeviation(TState from) => _deviations[States.Require(from)];

    /// <summary>Gets the variance of the time, in squared steps or units of time.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">It is larger than a double can hold; its root, <see cref="StandardDeviation"/>, is not.</exception>
    public double Variance(TState from) => InRange(_variances, from);

    /// <summary>Gets the mean of the third power of the time, in cubed steps or units of time. Its error is not covered by the certificate.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">It is larger than a double can hold.</exception>
    public double ThirdMoment(TState from) => InRange(_thirdMoments, from);

    /// <summary>Enumerates the states with their standard deviation, in state order.</summary>
    public IEnumerator<KeyValuePair<TState, double>> GetEnumerator() => States.Select((state, position) => KeyValuePair.Create(state, _deviations[position])).GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();

    /// <summary>A small table of means and standard deviations, the same in every culture.</summary>
    public override string ToString() =>
        StateTable.Write(States, ["from", "mean", "standard deviation"], position => [_means[position], _deviations[position]]);

    /// <summary>The variance by position, of any magnitude; nothing where the mean is infinite.</summary>
    internal ScaledDoubleDouble WideVariance(int state) => _variances[state];

    /// <summary>The mean by position.</summary>
    internal double MeanAt(int state) => _means[state];

    private double InRange(ScaledDoubleDouble[] values, TState from)
    {
        var state = States.Require(from);
        if (!double.IsFinite(_means[state]))
        {
            return double.PositiveInfinity;
        }

        var value = values[state].ToDouble();
        return values[state].IsZero || double.IsNormal(value)
            ? value
            : throw new NumericalRangeException(Messages.MomentOutOfRange(from, values[state].Exponent), Text.Label(from));
    }
}
