namespace Stochastic.Chains.Tests.Model;

public class ConcurrencyTests
{
    private const int Threads = 16;

    [Fact]
    public async Task One_chain_answers_sixteen_threads_at_once()
    {
        var chain = Chain.FromTransitions(Enumerable.Range(0, 200).SelectMany(k =>
            new[] { new Transition<string>($"s{k}", $"s{(k + 1) % 200}", 0.75), new Transition<string>($"s{k}", $"s{k / 2}", 0.25) }.DistinctBy(move => move.To)),
            new ChainOptions<string> { RowSums = RowSums.Rescale(0.5) });
        var expected = Answers(chain);

        var answers = await OnThreads(() => Answers(chain));

        answers.Should().HaveCount(Threads).And.OnlyContain(answer => answer == expected);
    }

    [Fact]
    public async Task A_derived_fact_is_computed_once_however_many_ask()
    {
        var chain = Chain.FromMatrix(new[,] { { 1.0 } });
        var runs = 0;

        var facts = await OnThreads(() => chain.Derive(_ =>
        {
            Interlocked.Increment(ref runs);
            return new object();
        }));

        runs.Should().Be(1);
        facts.Distinct().Should().ContainSingle();
    }

    private static async Task<T[]> OnThreads<T>(Func<T> question)
    {
        using var start = new Barrier(Threads);
        return await Task.WhenAll(Enumerable.Range(0, Threads).Select(_ => Task.Factory.StartNew(
            () =>
            {
                start.SignalAndWait();
                return question();
            },
            CancellationToken.None,
            TaskCreationOptions.LongRunning,
            TaskScheduler.Default)));
    }

    private static string Answers(Chain<string> chain)
    {
        var row = chain.Row("s7");
        return string.Join(
            '|',
            chain.ToString(),
            chain["s7", "s8"],
            row.Expectation(state => chain.States.IndexOf(state)),
            row.MostLikely(2)[0].Key,
            chain.Transitions.Sum(move => move.Probability),
            chain.ToArray().Cast<double>().Sum(),
            chain.ToMatrix().Trace(),
            chain.RescaledRows.Count);
    }
}
