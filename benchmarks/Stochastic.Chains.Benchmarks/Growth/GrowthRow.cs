namespace Stochastic.Chains.Benchmarks.Growth;

/// <summary>Time and memory of a question at one size.</summary>
/// <param name="Question">What was asked.</param>
/// <param name="Measure">What grows: states or transitions.</param>
/// <param name="Order">The order of the time in theory, as an exponent of the measure.</param>
/// <param name="MemoryOrder">The order of the memory in theory.</param>
/// <param name="Size">The size.</param>
/// <param name="Milliseconds">The least time of the whole call without evidence.</param>
/// <param name="FirstBytes">Allocated by the first call at this size, which fills the pools.</param>
/// <param name="LaterBytes">Allocated by a later call.</param>
internal sealed record GrowthRow(
    string Question, string Measure, double Order, double MemoryOrder, int Size, double Milliseconds, long FirstBytes, long LaterBytes);
