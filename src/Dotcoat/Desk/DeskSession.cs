using System.Collections.Concurrent;
using System.Diagnostics;
using System.Globalization;
using Colorimetry;
using Dotcoat.Commands;
using Dotcoat.Terminal;
using FilmDesign;
using FilmOptics;
using FilmReports;
using FilmReports.Safety;

namespace Dotcoat.Desk;

/// <summary>One film file at the desk. Pages hold what they changed; here are the file's text, its spectra and the model.</summary>
/// <remarks>No page's film is kept here but for recovery, so that two pages cannot come into each other's way.</remarks>
internal sealed class DeskSession : IDisposable
{
    private const int MostReports = 8;

    private readonly string _shownPath;
    private readonly string _path;
    private readonly string _text;
    private readonly IFilmModel _model;
    private readonly SpectrumShelf _shelf = new();
    private readonly FilmFolder _folder;

    // The model keeps what does not depend on the loadings, for one solve at a time.
    private readonly SemaphoreSlim _modelGate = new(1);
    private readonly SemaphoreSlim _fileGate = new(1);
    private readonly ConcurrentDictionary<string, string> _savedByTab = new(StringComparer.Ordinal);
    private readonly ConcurrentDictionary<string, IReadOnlyList<ReportFile>> _reports = new(StringComparer.Ordinal);

    /// <summary>Opens a film file.</summary>
    /// <param name="shownPath">As the user wrote it.</param>
    /// <param name="path">Where it is.</param>
    /// <param name="model">The model of the session.</param>
    /// <exception cref="InputException">The file has faults.</exception>
    public DeskSession(string shownPath, string path, IFilmModel model)
    {
        (_shownPath, _path, _model) = (shownPath, Path.GetFullPath(path), model);
        // Faults name the file as the user did.
        _text = FilmFile.ReadText(path);
        FilmCase = FilmFile.Parse(_text, path, []);
        _folder = new(_path);
        Dropped = new(_folder.Path, _shelf);
        Unsaved = new(_path, Dropped);
        Controls = FilmControls.Of(_text, _path, FilmCase);
    }

    /// <summary>The film as the file has it.</summary>
    public FilmCase FilmCase { get; }

    public FilmControls Controls { get; }

    public DroppedSpectra Dropped { get; }

    public UnsavedFilms Unsaved { get; }

    public LongRuns Runs { get; } = new();

    /// <summary>What a page needs to set itself up.</summary>
    public object Description => new
    {
        title = FilmCase.Film.Title,
        file = Path.GetFileName(_path),
        name = FilmCommand.NameOf(_path),
        hasTarget = FilmCase.Target is { Free.Count: 2 },
        groups = Controls.Groups,
        charts = PageCharts.Names,
        unsaved = Unsaved.Offers.Select(film => new { film.Tab, film.State }),
        version = CommandLine.Version,
    };

    /// <summary>Solves a page's film and draws what it shows.</summary>
    public async Task<FilmReply> SolveAsync(PageRequest request, CancellationToken cancellationToken)
    {
        var watch = Stopwatch.StartNew();
        var state = Keep(request);
        var filmCase = Read(state);
        var appraisal = FilmAppraiser.Appraise(filmCase, await SolveAsync(filmCase, cancellationToken).ConfigureAwait(false));
        double solveMs = watch.Elapsed.TotalMilliseconds;
        // Drawing takes as long as solving, and one chart does not wait for another.
        var charts = (request.Charts ?? []).Where(PageCharts.Names.Contains).Distinct(StringComparer.Ordinal).AsParallel()
            .Select(name => KeyValuePair.Create(name, PageCharts.Svg(name, filmCase, appraisal, request.Dark)))
            .ToDictionary(StringComparer.Ordinal);
        double distance = Whites.DistanceToTarget(filmCase, appraisal) ?? double.NaN;
        return new(
            Whites.Answer(filmCase, appraisal),
            filmCase.Target is { } target ? distance <= target.ToleranceXy : null,
            [.. KeyFigures.Of(filmCase, appraisal)],
            [.. FilmText.Tables(filmCase, appraisal)],
            Controls.Readings(filmCase),
            charts,
            appraisal.Warnings,
            Cautions.For(filmCase, appraisal),
            state.Spectra.Count > 0 ? null : EquivalentCommand(state),
            Math.Round(solveMs, 2),
            Math.Round(watch.Elapsed.TotalMilliseconds - solveMs, 2));
    }

    /// <summary>The ground that a chart of every film has, as PNG; null for a chart without one.</summary>
    public async Task<byte[]?> GroundAsync(string chart, bool isDark, CancellationToken cancellationToken)
    {
        if (!PageCharts.Names.Contains(chart, StringComparer.Ordinal))
            return null;
        var appraisal = FilmAppraiser.Appraise(FilmCase, await SolveAsync(FilmCase, cancellationToken).ConfigureAwait(false));
        return PageCharts.GroundPng(chart, FilmCase, appraisal, isDark);
    }

    /// <summary>Finds the loadings that put white on target.</summary>
    public async Task<FormulateReply> FormulateAsync(PageRequest request, CancellationToken cancellationToken)
    {
        var filmCase = Read(Keep(request));
        if (filmCase.Target is null)
            throw new FieldException([new(null, "The film file has no target: give it target with white_xy.")]);
        await _modelGate.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            var formulation = LoadingSolver.Formulate(filmCase, _model, cancellationToken);
            return new(Controls.LoadingsOf(formulation.FilmCase.Film), formulation.Reached, FilmText.Outcome(formulation));
        }
        catch (InputException refused)
        {
            throw Mapped(refused, []);
        }
        finally
        {
            _modelGate.Release();
        }
    }

    /// <summary>Saves a page's film as a film file in the folder.</summary>
    /// <exception cref="ConflictException">The file there is not the one that the page saved before.</exception>
    public async Task<SaveReply> SaveAsync(PageRequest request, CancellationToken cancellationToken)
    {
        var state = Keep(request);
        var filmCase = Read(state);
        string path = _folder.FilmPath(request.Name);
        string[] overrides = [.. state.Overrides.Select(pair => pair.Override)];
        await _fileGate.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            if (File.Exists(path) && (request.Seen is null || SavedFilm.CheckOf(FilmFile.ReadText(path)) != request.Seen))
                throw new ConflictException($"{Path.GetFileName(path)} is there already and is not what this page saved; it is not replaced. Save under another name.");
            var saved = SavedFilm.Plan(_text, _path, path, overrides);
            foreach (string name in state.Spectra.Values.Distinct(StringComparer.Ordinal))
                Dropped.Save(name);
            string check = saved.Write(filmCase.Film, cancellationToken);
            _savedByTab[request.Tab!] = state.Fingerprint;
            Unsaved.Keep(request.Tab!, state, isSaved: true);
            Unsaved.Write();
            return new(Path.GetFileName(path), check);
        }
        catch (InputException refused)
        {
            throw Mapped(refused, state.Overrides);
        }
        finally
        {
            _fileGate.Release();
        }
    }

    /// <summary>Makes the report of a page's film, as the command report does, into reports/NAME beside the film file.</summary>
    public async Task<ReportReply> ReportAsync(PageRequest request, CancellationToken cancellationToken)
    {
        var filmCase = Read(Keep(request));
        string path = _folder.ReportPath(request.Name);
        var appraisal = FilmAppraiser.Appraise(filmCase, await SolveAsync(filmCase, cancellationToken).ConfigureAwait(false));
        var files = FilmReport.Write(filmCase, appraisal, null);
        string name = Path.GetFileName(path);
        await _fileGate.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            OutputFolder.Write(path, [.. files.Select(file => new OutputFile(file.Name, file.Bytes))], cancellationToken);
            if (_reports.Count >= MostReports)
                _reports.Clear();
            _reports[name] = files;
            return new($"reports/{name}", name, [.. files.Select(file => file.Name)]);
        }
        catch (InputException refused)
        {
            throw Mapped(refused, []);
        }
        finally
        {
            _fileGate.Release();
        }
    }

    /// <summary>A file of a report that this session made; null for anything else.</summary>
    public byte[]? ReportFile(string name, string file) =>
        _reports.TryGetValue(name, out var files) ? files.FirstOrDefault(one => one.Name == file)?.Bytes : null;

    /// <summary>Begins tracing a page's film.</summary>
    public RunReply Trace(PageRequest request)
    {
        var filmCase = Read(Keep(request));
        if (request.Photons is not (>= LongRuns.LeastPhotons and <= LongRuns.MostPhotons))
        {
            throw new FieldException([new("trace-photons", string.Create(
                CultureInfo.InvariantCulture, $"A whole number from {LongRuns.LeastPhotons:#,0} to {LongRuns.MostPhotons:#,0} is due."))]);
        }

        string id = Runs.Start(filmCase, request.Photons.Value, request.Seed ?? 1)
            ?? throw new ConflictException("A run is under way already; stop it or wait for its end.");
        return new(id, 0, Finished: false, null, null);
    }

    /// <summary>How far a run is, with its figures once it has ended; null where there is no such run.</summary>
    public async Task<RunReply?> RunAsync(string id, CancellationToken cancellationToken)
    {
        if (Runs.Find(id) is not { } run)
            return null;
        if (!run.Work.IsCompleted)
            return new(run.Id, run.DoneShare, Finished: false, null, null);
        try
        {
            var traced = await run.Work.ConfigureAwait(false);
            var exact = FilmAppraiser.Appraise(run.FilmCase, await SolveAsync(run.FilmCase, cancellationToken).ConfigureAwait(false));
            string message = traced.Output.Warnings is [var warning, ..] ? warning : Whites.Answer(run.FilmCase, traced);
            return new(run.Id, run.DoneShare, Finished: true, message, TracedTable.Of(run.FilmCase, traced, exact));
        }
        catch (OperationCanceledException) when (run.Work.IsCanceled || run.Work.IsFaulted)
        {
            return new(run.Id, 0, Finished: true, "Stopped before anything was traced.", null);
        }
        catch (Exception failed) when (failed is InputException or NumericalFailureException)
        {
            return new(run.Id, 0, Finished: true, failed.Message, null);
        }
    }

    /// <summary>Solves the file's film once, so that the first page need not wait.</summary>
    public async Task WarmAsync(CancellationToken cancellationToken)
    {
        try
        {
            await SolveAsync(FilmCase, cancellationToken).ConfigureAwait(false);
        }
        catch (Exception failed) when (failed is FieldException or NumericalFailureException or OperationCanceledException)
        {
            // The page asks the same and says so.
        }
    }

    public void Dispose()
    {
        Runs.Dispose();
        Unsaved.Dispose();
        _modelGate.Dispose();
        _fileGate.Dispose();
    }

    private FilmState Keep(PageRequest request)
    {
        if (!UnsavedFilms.IsTab(request.Tab))
            throw new FieldException([new(null, "The page sent no name of its own; load it again.")]);
        var state = (request.State ?? FilmState.Unchanged).Checked(Controls, Dropped);
        bool isSaved = _savedByTab.TryGetValue(request.Tab!, out string? saved) && saved == state.Fingerprint;
        Unsaved.Keep(request.Tab!, state, isSaved);
        return state;
    }

    private FilmCase Read(FilmState state)
    {
        try
        {
            return FilmFile.Parse(_text, _path, [.. state.Overrides.Select(pair => pair.Override)], _shelf);
        }
        catch (InputException refused)
        {
            throw Mapped(refused, state.Overrides);
        }
    }

    private async Task<FilmOutput> SolveAsync(FilmCase filmCase, CancellationToken cancellationToken)
    {
        await _modelGate.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            return _model.Solve(filmCase.Film, cancellationToken);
        }
        catch (InputException refused)
        {
            throw Mapped(refused, []);
        }
        finally
        {
            _modelGate.Release();
        }
    }

    // A fault of an override belongs to its field; one of the file to the field whose value stands there.
    private FieldException Mapped(InputException refused, IReadOnlyList<(string Key, string Override)> overrides) => new(
    [
        .. refused.Faults.Select(fault => new FieldFault(
            overrides.FirstOrDefault(pair => fault.File == $"--set {pair.Override}").Key
                ?? (fault.File == _path ? Controls.FieldAt(fault.Line, fault.Column) : null),
            fault.Message)),
    ]);

    private string EquivalentCommand(FilmState state) => string.Join(' ',
        state.Overrides.Select(pair => $"--set {ShellWord(pair.Override)}").Prepend($"dotcoat simulate {ShellWord(_shownPath)}"));

    private static string ShellWord(string text) =>
        text.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '_' or '-' or '/' or '=' or '+') ? text : $"'{text.Replace("'", "'\\''", StringComparison.Ordinal)}'";
}

/// <summary>What stands on the disk is not what the page takes it for.</summary>
internal sealed class ConflictException(string message) : Exception(message);
