using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Tests.Estimation;

public sealed class StreamingEventsTests
{
    private static readonly LogEvent<string, string>[] Events = Scans.Of(
        "c1 2024-01-01T08:00 clean", "c2 2024-01-01T08:00 clean", "c1 2024-01-02T08:00 filled", "c2 2024-01-01T07:00 dirty");

    [Fact]
    public async Task A_stream_counts_as_the_same_events_in_memory()
    {
        var streamed = await TransitionCounts.FromEventsAsync(Stream(Events));

        streamed.Moves().Should().Equal(TransitionCounts.FromEvents(Events).Moves());
        streamed.Log!.Events.Should().Be(4);
    }

    [Fact]
    public async Task A_stream_takes_options()
    {
        var options = new LogOptions<string> { States = ["dirty", "clean", "filled"] };

        (await TransitionCounts.FromEventsAsync(Stream(Events), options)).States.Should().Equal("dirty", "clean", "filled");
    }

    [Fact]
    public async Task Faults_of_a_stream_are_refused_with_their_event_numbers()
    {
        var act = () => TransitionCounts.FromEventsAsync(Stream(Scans.Of("c1 2024-01-01T08:00 clean", "c1 2024-01-01T08:00 dirty")));

        (await act.Should().ThrowAsync<EventLogException>()).WithMessage("*Item 'c1' is in 'clean' (event 1) and in 'dirty' (event 2) at one instant*");
    }

    [Fact]
    public async Task The_token_reaches_the_stream_and_stops_it()
    {
        using var source = new CancellationTokenSource();
        var stream = Endless(source, cancelAfter: 1000);

        var act = () => TransitionCounts.FromEventsAsync(stream, new LogOptions<string>(), source.Token);

        await act.Should().ThrowAsync<OperationCanceledException>();
    }

    [Fact]
    public async Task The_token_of_the_options_stops_the_stream_too()
    {
        using var source = new CancellationTokenSource();
        var stream = Endless(source, cancelAfter: 1000);

        var act = () => TransitionCounts.FromEventsAsync(stream, new LogOptions<string> { CancellationToken = source.Token });

        await act.Should().ThrowAsync<OperationCanceledException>();
    }

    private static async IAsyncEnumerable<LogEvent<string, string>> Stream(LogEvent<string, string>[] events)
    {
        foreach (var entry in events)
        {
            await Task.Yield();
            yield return entry;
        }
    }

    private static async IAsyncEnumerable<LogEvent<int, string>> Endless(
        CancellationTokenSource source, int cancelAfter, [EnumeratorCancellation] CancellationToken token = default)
    {
        for (var k = 0; ; k++)
        {
            if (k == cancelAfter)
            {
                await source.CancelAsync().ConfigureAwait(false);
            }

            token.ThrowIfCancellationRequested();
            yield return new LogEvent<int, string>(k, DateTimeOffset.UnixEpoch, "clean");
        }
    }
}
