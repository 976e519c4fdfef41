using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>A method of a question: it answers the chain, with its certificate or without one, or refuses.</summary>
/// <param name="Name">What the tables call it.</param>
/// <param name="Answer">The numbers, in the order of the truth, and their certificate; null where it refused or did not converge.</param>
internal sealed record Trial(string Name, Func<Chain<int>, double[,], (double[] Values, Certificate? Certificate)?> Answer)
{
    /// <summary>Answers, and counts a refusal for what it is.</summary>
    internal (double[] Values, Certificate? Certificate)? Try(Chain<int> chain, double[,] matrix)
    {
        try
        {
            return Answer(chain, matrix);
        }
        catch (Exception refusal) when (refusal is ConvergenceException or NumericalRangeException)
        {
            return null;
        }
    }

    /// <summary>The largest relative error of an entry.</summary>
    internal static double RelativeError(Rational[] truth, double[] values) => truth.Zip(values, (exact, value) => exact.RelativeDifference(value)).Max();

    /// <summary>The largest absolute error of an entry.</summary>
    internal static double AbsoluteError(Rational[] truth, double[] values) => truth.Zip(values, AbsoluteDifference).Max();

    private static double AbsoluteDifference(Rational exact, double value) =>
        double.IsFinite(value) ? Rational.Abs(exact - Rational.FromDouble(value)).ToDouble() : double.PositiveInfinity;
}
