using System.Collections.Concurrent;
using System.Text.Json;
using System.Text.RegularExpressions;

namespace Dotcoat.Desk;

/// <summary>A film that a page left without saving.</summary>
/// <param name="Tab">The page it was changed in.</param>
/// <param name="State">What was changed.</param>
/// <param name="Dropped">The dropped files in use.</param>
internal sealed record UnsavedFilm(string Tab, FilmState State, IReadOnlyList<UnsavedSpectrum> Dropped);

/// <summary>A dropped file of an unsaved film.</summary>
internal sealed record UnsavedSpectrum(string Name, byte[] Bytes);

/// <summary>Keeps every page's unsaved film in a recovery file beside the film file, one for each page, so that no stop loses it.</summary>
internal sealed partial class UnsavedFilms : IDisposable
{
    private const int MostFiles = 50;
    private const long MostBytes = 128L << 20;
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(1);

    private readonly string _folder;
    private readonly string _prefix;
    private readonly DroppedSpectra _dropped;
    private readonly ConcurrentDictionary<string, FilmState> _states = new(StringComparer.Ordinal);
    private readonly ConcurrentDictionary<string, string> _written = new(StringComparer.Ordinal);

    // Of an earlier run, not taken up by a page yet.
    private readonly ConcurrentDictionary<string, bool> _left = new(StringComparer.Ordinal);
    private readonly Lock _gate = new();
    private readonly Timer _timer;

    /// <summary>For one film file.</summary>
    /// <param name="filmPath">The film file.</param>
    /// <param name="dropped">Where dropped files are.</param>
    public UnsavedFilms(string filmPath, DroppedSpectra dropped)
    {
        _folder = Path.GetDirectoryName(Path.GetFullPath(filmPath))!;
        _prefix = $".{Path.GetFileName(filmPath)}.unsaved-";
        _dropped = dropped;
        Read();
        _timer = new(_ => Write(), null, Patience, Patience);
    }

    /// <summary>Whether a text can name a page.</summary>
    public static bool IsTab(string? tab) => tab is not null && TabPattern().IsMatch(tab);

    /// <summary>Films of an earlier run that no page has taken up.</summary>
    public IReadOnlyList<UnsavedFilm> Offers =>
        [.. _states.Where(entry => _left.ContainsKey(entry.Key)).Select(entry => new UnsavedFilm(entry.Key, entry.Value, []))];

    /// <summary>Takes note of a page's film; one that is as it was saved is none.</summary>
    public void Keep(string tab, FilmState state, bool isSaved)
    {
        _left.TryRemove(tab, out _);
        if (isSaved || state.IsUnchanged)
            _states.TryRemove(tab, out _);
        else
            _states[tab] = state;
    }

    /// <summary>Forgets a film that a page left.</summary>
    public void Discard(string tab)
    {
        _left.TryRemove(tab, out _);
        _states.TryRemove(tab, out _);
        Write();
    }

    /// <summary>Brings the recovery files up to date. Quiet where the folder cannot be written: the film is still on the page.</summary>
    public void Write()
    {
        lock (_gate)
        {
            foreach (var (tab, state) in _states)
            {
                string fingerprint = state.Fingerprint;
                if (_written.TryGetValue(tab, out string? known) && known == fingerprint)
                    continue;
                var dropped = state.Spectra.Values.Distinct(StringComparer.Ordinal)
                    .Select(_dropped.Find).OfType<DroppedSpectrum>().Select(file => new UnsavedSpectrum(file.Name, file.Bytes));
                if (Try(() => WholeFile.Write(PathOf(tab), JsonSerializer.SerializeToUtf8Bytes(new UnsavedFilm(tab, state, [.. dropped]), DeskJson.Options))))
                    _written[tab] = fingerprint;
            }

            foreach (string tab in _written.Keys.Except(_states.Keys, StringComparer.Ordinal).ToList())
            {
                if (Try(() => File.Delete(PathOf(tab))))
                    _written.TryRemove(tab, out _);
            }
        }
    }

    /// <summary>Writes what is not written yet and stops.</summary>
    public void Dispose()
    {
        _timer.Dispose();
        Write();
    }

    private static bool Try(Action action)
    {
        try
        {
            action();
            return true;
        }
        catch (Exception failed) when (failed is IOException or UnauthorizedAccessException)
        {
            return false;
        }
    }

    private string PathOf(string tab) => Path.Combine(_folder, $"{_prefix}{tab}.json");

    private void Read()
    {
        foreach (string path in Directory.EnumerateFiles(_folder, $"{_prefix}*.json").Order(StringComparer.Ordinal).Take(MostFiles))
        {
            if (new FileInfo(path) is not { LinkTarget: null, Length: <= MostBytes })
                continue;
            Try(() => Take(path));
        }
    }

    // A file that is no recovery file of ours, or was cut short, is left alone.
    private void Take(string path)
    {
        try
        {
            var film = JsonSerializer.Deserialize<UnsavedFilm>(File.ReadAllBytes(path), DeskJson.Options);
            if (film is not { State: { Fields: not null, Spectra: not null }, Dropped: not null } || !IsTab(film.Tab) || PathOf(film.Tab) != path)
                return;
            var names = film.Dropped.ToDictionary(file => file.Name, file => _dropped.Add(file.Name, file.Bytes).Name, StringComparer.Ordinal);
            var spectra = film.State.Spectra.ToDictionary(s => s.Key, s => names.GetValueOrDefault(s.Value, s.Value), StringComparer.Ordinal);
            _states[film.Tab] = film.State with { Spectra = new(spectra, StringComparer.Ordinal) };
            _written[film.Tab] = "";
            _left[film.Tab] = true;
        }
        catch (Exception notOurs) when (notOurs is JsonException or Colorimetry.InputException or ArgumentException)
        {
            return;
        }
    }

    [GeneratedRegex("^[0-9a-f]{16}$", RegexOptions.CultureInvariant, matchTimeoutMilliseconds: 1000)]
    private static partial Regex TabPattern();
}
