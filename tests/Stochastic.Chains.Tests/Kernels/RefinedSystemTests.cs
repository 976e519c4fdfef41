using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

public class RefinedSystemTests
{
    private const int ChainsPerFamily = 200;
    private const int LargestSize = 40;
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double ProvedUnits = 4;

    public static TheoryData<string> Families => StationaryTrial.Families;

    [Theory]
    [MemberData(nameof(Families))]
    public void Times_are_never_off_by_more_than_the_bound_and_four_units_where_refinement_contracts(string family)
    {
        foreach (var trial in ChainFamilies.Named(family).Samples(ChainsPerFamily, LargestSize).Select(PassageTrial.TimesOf))
        {
            Check(trial, error: 0);
            Check(trial, error: 1e-3);
        }
    }

    [Theory]
    [InlineData("reducible")]
    [InlineData("rare absorption")]
    public void Probabilities_are_never_off_by_more_than_the_bound_and_four_units_where_refinement_contracts(string family)
    {
        foreach (var trial in ChainFamilies.Named(family).Samples(ChainsPerFamily, LargestSize).Select(PassageTrial.EndsOf))
        {
            Check(trial, error: 0);
            Check(trial, error: 1e-3);
        }
    }

    private static void Check(PassageTrial trial, double error)
    {
        if (!trial.IsInRange)
        {
            return;
        }

        var count = trial.States.Length;
        var factors = new PlainFactors(trial.Table, count, count + 1, count);
        var solveError = SubtractionFreeBound.OfElimination(count, count + 1, merges: count);
        var start = trial.Wrong(error);
        var refined = start.ToArray();
        var bound = RefinedSystem.Refine(trial.Dense, trial.States, trial.Given, refined, factors, solveError, CancellationToken.None);
        trial.TrueError(refined).Should().BeLessThanOrEqualTo(bound, "{0}", trial);
        if (double.IsPositiveInfinity(bound))
        {
            refined.Should().Equal(start, "{0}", trial);
        }

        if (trial.Jumps * UnitRoundoff < 1.0 / 16)
        {
            bound.Should().BeLessThanOrEqualTo(ProvedUnits * UnitRoundoff, "{0}: {1} jumps", trial, trial.Jumps);
        }
    }
}
