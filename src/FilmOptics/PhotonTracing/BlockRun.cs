namespace FilmOptics.PhotonTracing;

/// <summary>Runs blocks of photons on several threads and joins what they counted.</summary>
internal sealed class BlockRun(long photons, int threads)
{
    private static readonly TimeSpan BetweenReports = TimeSpan.FromMilliseconds(200);

    /// <typeparam name="T">A tally of whole numbers, so that the order of joining does not matter.</typeparam>
    /// <param name="create">An empty tally.</param>
    /// <param name="trace">Traces block number, so many photons, into a tally.</param>
    /// <param name="join">Adds the second tally to the first.</param>
    /// <param name="report">Told now and then what has been counted.</param>
    /// <param name="cancellationToken">
    /// No block is begun after it is set, and each one begun is finished: a block must not count less for taking long.
    /// </param>
    public T Run<T>(
        Func<T> create, Action<long, int, T> trace, Action<T, T> join, Action<T>? report, CancellationToken cancellationToken)
        where T : class
    {
        const int size = PhotonTracingModel.BlockPhotons;
        long blocks = (photons + size - 1) / size, next = -1;
        var sum = create();
        var gate = new Lock();
        long reported = Environment.TickCount64;

        void Work()
        {
            var own = create();
            long joined = Environment.TickCount64;
            while (!cancellationToken.IsCancellationRequested)
            {
                long block = Interlocked.Increment(ref next);
                if (block >= blocks)
                    break;
                trace(block, (int)Math.Min(size, photons - (block * size)), own);
                if (report is null || Environment.TickCount64 - joined < BetweenReports.TotalMilliseconds)
                    continue;
                Join();
                own = create();
                joined = Environment.TickCount64;
            }

            Join();

            void Join()
            {
                lock (gate)
                {
                    join(sum, own);
                    if (report is null || Environment.TickCount64 - reported < BetweenReports.TotalMilliseconds)
                        return;
                    reported = Environment.TickCount64;
                    report(sum);
                }
            }
        }

        Parallel.Invoke(
            new ParallelOptions { MaxDegreeOfParallelism = threads },
            [.. Enumerable.Repeat<Action>(Work, (int)Math.Min(threads, blocks))]);
        return sum;
    }
}
