namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>One question of one input, by this library and by its rivals. Each run returns one figure of its answer, so that all can be seen to agree.</summary>
/// <param name="Ours">The whole call without evidence.</param>
/// <param name="Proved">The whole call with its proof; null where the question has none.</param>
/// <param name="Rivals">Those it is held against.</param>
internal sealed record Contest(Func<double> Ours, Func<double>? Proved, IReadOnlyList<Rival> Rivals);
