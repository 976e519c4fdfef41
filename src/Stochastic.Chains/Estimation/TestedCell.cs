namespace Stochastic.Chains;

/// <summary>One cell of a table that was tested: what was counted there, and what one would expect if there were nothing to find.</summary>
/// <param name="Table">The table: the text of the state whose row is tested; empty where there is only one table.</param>
/// <param name="Row">What the row stands for: a state, a group, the steps already spent in a state.</param>
/// <param name="Column">What the column stands for: the next state, or staying and leaving.</param>
/// <param name="Observed">The count.</param>
/// <param name="Expected">The expected count: row total · column total / total.</param>
/// <example><code>TestedCell smallest = test.Cells.MinBy(cell => cell.Expected);</code></example>
public readonly record struct TestedCell(string Table, string Row, string Column, long Observed, double Expected);
