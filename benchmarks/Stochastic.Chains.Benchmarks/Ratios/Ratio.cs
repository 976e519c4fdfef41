namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>One question beside one rival.</summary>
/// <param name="Question">What is asked.</param>
/// <param name="Input">Of what.</param>
/// <param name="Rival">The operation of a general-purpose library that does the same arithmetic.</param>
/// <param name="Milliseconds">Of the whole call without evidence, on one thread; infinite where no answer was reached.</param>
/// <param name="ProvedMilliseconds">Of the whole call with its proof, the default; not a number where there is none.</param>
/// <param name="RivalMilliseconds">Of the rival.</param>
/// <param name="Target">The largest ratio that is aimed at; not a number where none is set.</param>
internal sealed record Ratio(
    string Question, string Input, string Rival, double Milliseconds, double ProvedMilliseconds, double RivalMilliseconds, double Target)
{
    /// <summary>Our time over that of the rival: below one is faster.</summary>
    internal double Value => Milliseconds / RivalMilliseconds;

    internal double ProvedValue => ProvedMilliseconds / RivalMilliseconds;

    internal bool HasTarget => !double.IsNaN(Target);

    internal bool Misses => HasTarget && Value > Target;

    internal bool IsSameComparison(Ratio other) => (Question, Input, Rival) == (other.Question, other.Input, other.Rival);
}
