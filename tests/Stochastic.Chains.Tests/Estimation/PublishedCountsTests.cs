namespace Stochastic.Chains.Tests.Estimation;

/// <summary>Estimates against published tables. Values are recomputed exactly from the counts; the printed figures are compared beside them.</summary>
public sealed class PublishedCountsTests
{
    private const double RelativeTolerance = 1e-12; // the values below carry 17 digits

    [Fact]
    public void Letters_of_a_verse_novel()
    {
        // Markov, A. A., address of 23 January 1913 (English translation: Science in Context 19(4), 2006, 591-600): 8638 vowels, 11362
        // consonants, 1104 vowel-vowel pairs, p1 = 1104/8638, p0 = 7535/11362; the other two counts follow from the totals.
        var chain = Fit(["vowel", "consonant"], new long[,] { { 1104, 7534 }, { 7535, 3827 } });

        ShouldBe(chain, new[,] { { 0.12780736281546654, 0.87219263718453346 }, { 0.66317549727160711, 0.33682450272839289 } });
        ShouldPrintAs(chain, new[,] { { 0.128, 0.872 }, { 0.663, 0.337 } }, decimals: 3);
    }

    [Fact]
    public void Daily_rain_at_tel_aviv()
    {
        // Gabriel, K. R. and Neumann, J., Quart. J. Roy. Met. Soc. 88 (1962) 90-95, as in Cox and Miller, The Theory of Stochastic
        // Processes, 1965, Example 3.2. Counts and printed figures from memory; the total 2437 = 27 winters of December to February.
        var counts = TransitionCounts.FromCounts(["dry", "wet"], new long[,] { { 1049, 350 }, { 351, 687 } });
        var chain = counts.ToChain();

        counts.TotalCount.Should().Be(2437);
        ShouldBe(chain, new[,] { { 0.74982130092923517, 0.25017869907076483 }, { 0.33815028901734104, 0.66184971098265896 } });
        ShouldPrintAs(chain, new[,] { { 0.750, 0.250 }, { 0.338, 0.662 } }, decimals: 3);
    }

    [Fact]
    public void Succession_of_rock_types()
    {
        // Davis, J. C., Statistics and Data Analysis in Geology, 3rd ed., Wiley 2002, ch. 4: sandstone, limestone, shale, coal, 63
        // moves. The estimates agree with the printed ones in every figure. (The book's two-step matrix and its test statistic differ
        // from the exact values, being computed there from rounded figures; they are not checked here.)
        var counts = TransitionCounts.FromCounts(["A", "B", "C", "D"], new long[,] { { 18, 0, 5, 0 }, { 0, 5, 2, 0 }, { 5, 2, 18, 3 }, { 0, 0, 3, 2 } });
        var chain = counts.ToChain();

        counts.TotalCount.Should().Be(63);
        ShouldBe(chain, new[,]
        {
            { 0.78260869565217391, 0, 0.21739130434782609, 0 },
            { 0, 0.71428571428571429, 0.28571428571428571, 0 },
            { 0.17857142857142857, 0.071428571428571429, 0.64285714285714286, 0.10714285714285714 },
            { 0, 0, 0.6, 0.4 },
        });
        ShouldPrintAs(chain, new[,] { { 0.78, 0, 0.22, 0 }, { 0, 0.71, 0.29, 0 }, { 0.18, 0.07, 0.64, 0.11 }, { 0, 0, 0.60, 0.40 } }, decimals: 2);
    }

    private static Chain<string> Fit(string[] states, long[,] counts) => TransitionCounts.FromCounts(states, counts).ToChain();

    private static void ShouldBe(Chain<string> chain, double[,] expected)
    {
        var fitted = chain.ToArray();
        for (var row = 0; row < chain.StateCount; row++)
        {
            for (var column = 0; column < chain.StateCount; column++)
            {
                fitted[row, column].Should().BeApproximately(expected[row, column], RelativeTolerance * expected[row, column]);
            }
        }
    }

    private static void ShouldPrintAs(Chain<string> chain, double[,] printed, int decimals)
    {
        var fitted = chain.ToArray();
        for (var row = 0; row < chain.StateCount; row++)
        {
            for (var column = 0; column < chain.StateCount; column++)
            {
                Math.Round(fitted[row, column], decimals).Should().Be(printed[row, column]);
            }
        }
    }
}
