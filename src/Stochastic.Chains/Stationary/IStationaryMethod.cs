namespace Stochastic.Chains;

/// <summary>A method that computes the stationary distribution of one recurrent class.</summary>
/// <remarks>
/// Implement it to bring a method of your own: it receives the problem and returns a raw vector, and the library normalizes,
/// checks and certifies it like that of any built-in method. A method is used by one solve at a time per call and should hold no
/// state of its own beyond its options.
/// </remarks>
/// <example>
/// <code>
/// sealed class ManySteps : IStationaryMethod
/// {
///     public string Name => "many steps";
///
///     public StationaryVector Solve(StationaryProblem problem)
///     {
///         double[] current = new double[problem.StateCount], next = new double[problem.StateCount];
///         current.AsSpan().Fill(1.0 / problem.StateCount);
///         for (int k = 0; k &lt; 1000; k++) { problem.Step(current, next); (current, next) = (next, current); }
///         return new StationaryVector(current) { HasConverged = true, Iterations = 1000, Reason = "As asked." };
///     }
/// }
/// </code>
/// </example>
public interface IStationaryMethod
{
    /// <summary>Gets the name of the method, as the certificate shows it.</summary>
    string Name { get; }

    /// <summary>Computes a vector proportional to the stationary distribution.</summary>
    /// <param name="problem">The recurrent class, its states numbered from 0.</param>
    /// <returns>A vector with a positive entry for each state, and whether it is as good as the method's options ask for.</returns>
    StationaryVector Solve(StationaryProblem problem);
}
