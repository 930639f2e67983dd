using System.Collections.Concurrent;
using System.Globalization;
using FilmOptics;

namespace Dotcoat.Desk;

/// <summary>A run that takes longer than a page should wait: it says how far it is and can be stopped.</summary>
internal sealed class LongRun : IDisposable
{
    private readonly CancellationTokenSource _stop = new();
    private TracingProgress? _progress;

    public LongRun(string id, FilmCase filmCase, long photons, ulong seed)
    {
        (Id, FilmCase) = (id, filmCase);
        var model = new PhotonTracingModel(photons, seed, threads: Math.Max(1, Environment.ProcessorCount - 1), progress: new Listener(this));
        Work = Task.Run(() => FilmAppraiser.Appraise(filmCase, model.Solve(filmCase.Film, _stop.Token)));
        Photons = photons;
    }

    public string Id { get; }

    public FilmCase FilmCase { get; }

    public long Photons { get; }

    /// <summary>The work; cancelled where it was stopped before anything was traced.</summary>
    public Task<FilmAppraisal> Work { get; }

    /// <summary>How much is done, 0…1.</summary>
    public double DoneShare => Work.IsCompletedSuccessfully ? (double)Work.Result.Output.Tracing!.Photons / Photons : _progress is { } progress ? (double)progress.PhotonsDone / Photons : 0;

    public void Stop() => _stop.Cancel();

    public void Dispose()
    {
        _stop.Cancel();
        _stop.Dispose();
    }

    private sealed class Listener(LongRun run) : IProgress<TracingProgress>
    {
        public void Report(TracingProgress value) => run._progress = value;
    }
}

/// <summary>The long runs of a desk: one at a time, the last few kept until asked for.</summary>
internal sealed class LongRuns : IDisposable
{
    /// <summary>Photons a page may ask for.</summary>
    public const long LeastPhotons = 10_000, MostPhotons = 2_000_000_000;

    private const int Kept = 8;

    private readonly ConcurrentDictionary<string, LongRun> _runs = new(StringComparer.Ordinal);
    private readonly Lock _gate = new();
    private int _next;

    /// <summary>Starts a run and returns its id; null where another is under way.</summary>
    public string? Start(FilmCase filmCase, long photons, ulong seed)
    {
        lock (_gate)
        {
            if (_runs.Values.Any(run => !run.Work.IsCompleted))
                return null;
            foreach (var old in _runs.Values.OrderBy(run => int.Parse(run.Id, CultureInfo.InvariantCulture)).SkipLast(Kept - 1))
            {
                if (_runs.TryRemove(old.Id, out var gone))
                    gone.Dispose();
            }

            string id = (++_next).ToString(CultureInfo.InvariantCulture);
            _runs[id] = new LongRun(id, filmCase, photons, seed);
            return id;
        }
    }

    public LongRun? Find(string id) => _runs.GetValueOrDefault(id);

    public void Dispose()
    {
        foreach (var run in _runs.Values)
            run.Dispose();
    }
}
