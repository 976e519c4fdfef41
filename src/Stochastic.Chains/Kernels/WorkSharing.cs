using System.Runtime.ExceptionServices;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Shares independent pieces of work between the calling thread and helpers from the thread pool. The caller never waits for a helper to
/// arrive: it takes pieces itself until none is left, then waits only for pieces that a helper has begun. A helper that comes late finds
/// nothing to do and leaves.
/// </summary>
internal sealed class WorkSharing(int threads, CancellationToken cancellation)
{
    /// <summary>The token that the work looks at.</summary>
    internal CancellationToken Cancellation => cancellation;

    /// <summary>Runs <paramref name="piece"/> once for each index below <paramref name="count"/>, in no fixed order.</summary>
    /// <exception cref="OperationCanceledException">Cancellation was requested; it is looked for before each piece.</exception>
    internal void Run(int count, Action<int> piece)
    {
        if (threads <= 1 || count <= 1)
        {
            for (var index = 0; index < count; index++)
            {
                cancellation.ThrowIfCancellationRequested();
                piece(index);
            }

            return;
        }

        var round = new Round(count, piece, cancellation);
        for (var helpers = Math.Min(threads, count) - 1; helpers > 0; helpers--)
        {
            ThreadPool.UnsafeQueueUserWorkItem(round, preferLocal: false);
        }

        round.Execute();
        round.WaitForHelpers();
        cancellation.ThrowIfCancellationRequested();
    }

    private sealed class Round(int count, Action<int> piece, CancellationToken cancellation) : IThreadPoolWorkItem
    {
        private readonly object _gate = new();
        private ExceptionDispatchInfo? _failure;
        private int _taken;
        private int _finished;

        public void Execute()
        {
            for (var index = Interlocked.Increment(ref _taken) - 1; index < count; index = Interlocked.Increment(ref _taken) - 1)
            {
                Attempt(index);
                if (Interlocked.Increment(ref _finished) == count)
                {
                    lock (_gate)
                    {
                        Monitor.Pulse(_gate);
                    }
                }
            }
        }

        internal void WaitForHelpers()
        {
            lock (_gate)
            {
                while (Volatile.Read(ref _finished) < count)
                {
                    Monitor.Wait(_gate);
                }
            }

            _failure?.Throw();
        }

        private void Attempt(int index)
        {
            if (cancellation.IsCancellationRequested || _failure is not null)
            {
                return;
            }

            try
            {
                piece(index);
            }
            catch (Exception exception) when (Keep(exception))
            {
                // The caller throws it again, on its own thread.
            }
        }

        private bool Keep(Exception exception)
        {
            _failure = ExceptionDispatchInfo.Capture(exception);
            return true;
        }
    }
}
