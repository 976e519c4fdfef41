namespace Stochastic.Chains;

/// <summary>A row that was divided by its sum because <see cref="RowSums.Rescale(double)"/> asked for it.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <param name="State">The state whose row it is.</param>
/// <param name="Sum">The sum of the probabilities as given.</param>
/// <example><code>foreach (RescaledRow&lt;string&gt; row in chain.RescaledRows) { Console.WriteLine(row); }</code></example>
public readonly record struct RescaledRow<TState>(TState State, double Sum)
    where TState : notnull
{
    /// <summary>Gets how far the sum was from one: positive when the row summed to more.</summary>
    public double Deviation => Sum - 1;
}
