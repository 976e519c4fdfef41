using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>A question with its exact answer and its methods.</summary>
/// <param name="Question">What is asked.</param>
/// <param name="Families">The families of chains it is asked of.</param>
/// <param name="Truth">The answer in exact arithmetic, in the order in which methods give theirs.</param>
/// <param name="Trials">The methods.</param>
internal sealed record Inquiry(string Question, IReadOnlyList<AccuracyFamily> Families, Func<ExactChain, Rational[]> Truth, IReadOnlyList<Trial> Trials);
