using System.Diagnostics;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A test of what a chain assumes, on counts: by likelihood ratio and by chi-square.</summary>
/// <remarks>
/// <para>
/// A small p-value says that counts like these would be rare if there were nothing to find. A large one is no proof that there is nothing: few counts
/// find little. With very many counts even differences that do not matter are found; then look at how large they are.
/// </para>
/// <para>
/// Both statistics follow the chi-square law only when the expected counts are not small; a cell below five is reported (common practice, no source).
/// Sources: Anderson and Goodman (1957), Ann. Math. Statist. 28, 89–110; Billingsley (1961), Ann. Math. Statist. 32, 12–40.
/// </para>
/// <para>Immutable and safe for concurrent use.</para>
/// </remarks>
/// <example>
/// <code>
/// ChainTest test = counts.TestIndependence();
/// Console.WriteLine(test.Finding);
/// bool matters = test.LikelihoodRatio.PValue &lt; 0.01;
/// </code>
/// </example>
[DebuggerDisplay("{Finding,nq}")]
public sealed class ChainTest
{
    private const double UsualSignificance = 0.05; // common practice, no source
    private const double SmallExpectation = 5; // common practice, no source

    private readonly IReadOnlyList<ContingencyTable> _tables;

    internal ChainTest(IReadOnlyList<ContingencyTable> tables, Func<bool, string> conclude)
    {
        _tables = tables;
        DegreesOfFreedom = tables.Sum(table => table.DegreesOfFreedom);
        var statistics = ContingencyStatistics.Of(tables);
        LikelihoodRatio = new TestStatistic(statistics.LikelihoodRatio, ChiSquareTail.Of(statistics.LikelihoodRatio, DegreesOfFreedom));
        ChiSquare = new TestStatistic(statistics.ChiSquare, ChiSquareTail.Of(statistics.ChiSquare, DegreesOfFreedom));
        SmallestExpected = statistics.SmallestExpected;
        Null = statistics.Null;
        Alternative = statistics.Alternative;
        Finding = DegreesOfFreedom == 0 ? Messages.NothingToTest : Messages.Finding(conclude(Rejects(UsualSignificance)), LikelihoodRatio.Value, LikelihoodRatio.PValue, DegreesOfFreedom);
        Warning = DegreesOfFreedom > 0 && SmallestExpected < SmallExpectation
            ? Messages.SmallExpectedCounts(Cells.Count(cell => cell.Expected < SmallExpectation), Cells.Count(), SmallestExpected)
            : null;
    }

    /// <summary>Gets the likelihood ratio statistic, 2 Σ O ln(O/E), with its p-value.</summary>
    public TestStatistic LikelihoodRatio { get; }

    /// <summary>Gets Pearson's chi-square statistic, Σ (O − E)²/E, with its p-value.</summary>
    public TestStatistic ChiSquare { get; }

    /// <summary>Gets the degrees of freedom of both; rows and columns without a count add none. 0 when there is nothing to test.</summary>
    public long DegreesOfFreedom { get; }

    /// <summary>Gets the smallest expected count; +∞ when there is nothing to test.</summary>
    public double SmallestExpected { get; }

    /// <summary>Gets the fit of the simpler model, in which there is nothing to find.</summary>
    public ModelFit Null { get; }

    /// <summary>Gets the fit of the richer model.</summary>
    public ModelFit Alternative { get; }

    /// <summary>Gets what was found, in a sentence, by the likelihood ratio at the usual 5 %.</summary>
    public string Finding { get; }

    /// <summary>Gets a warning when expected counts are too small to trust the p-values; else null.</summary>
    public string? Warning { get; }

    /// <summary>Enumerates all cells with their expected counts, table by table; rows and columns without a count are left out.</summary>
    public IEnumerable<TestedCell> Cells =>
        from table in _tables
        from row in table.UsedRows
        from column in table.UsedColumns
        select new TestedCell(table.Name, table.RowLabels[row], table.ColumnLabels[column], table.Count(row, column), table.Expected(row, column));

    /// <summary>Tells whether the likelihood ratio speaks against the simpler model at a level of significance.</summary>
    /// <param name="significance">How often one accepts to be wrong when there is nothing to find, above 0 and below 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The level is not above 0 and below 1.</exception>
    public bool Rejects(double significance) => significance > 0 && significance < 1
        ? LikelihoodRatio.PValue < significance
        : throw new ArgumentOutOfRangeException(nameof(significance), significance, Messages.LevelOutOfRange);

    /// <summary>What was found, with the warning where there is one; the same in every culture.</summary>
    public override string ToString() => Warning is null ? Finding : $"{Finding} {Warning}";
}
