namespace Dotcoat.Desk;

/// <summary>What a page asks about its film.</summary>
/// <param name="Tab">The page.</param>
/// <param name="State">What it has changed.</param>
/// <param name="Charts">Charts to draw.</param>
/// <param name="Dark">Whether its ground is dark.</param>
/// <param name="Name">Name to save or report under.</param>
/// <param name="Seen">Check of the saved file that the page knows, where it saved under this name before.</param>
/// <param name="Photons">Photons to trace.</param>
/// <param name="Seed">Seed of the tracer.</param>
internal sealed record PageRequest(
    string? Tab, FilmState? State, IReadOnlyList<string>? Charts, bool Dark, string? Name, string? Seen, long? Photons, ulong? Seed);

/// <summary>A film's figures for the page.</summary>
/// <param name="Answer">Where white is, in a sentence.</param>
/// <param name="OnTarget">Whether white is on target; null without one.</param>
/// <param name="Key">The figures asked for first.</param>
/// <param name="Tables">All figures, as the terminal shows them.</param>
/// <param name="Readings">What follows from a field, shown beside it.</param>
/// <param name="Charts">SVG elements by name.</param>
/// <param name="Warnings">Of the film, its spectra and the model.</param>
/// <param name="Cautions">What to heed.</param>
/// <param name="Command">The command that prints the same figures; null while dropped files are not saved.</param>
/// <param name="SolveMs">Time of reading, solving and appraising, ms.</param>
/// <param name="DrawMs">Time of drawing, ms.</param>
internal sealed record FilmReply(
    string Answer,
    bool? OnTarget,
    IReadOnlyList<KeyFigure> Key,
    IReadOnlyList<Terminal.FigureTable> Tables,
    IReadOnlyDictionary<string, string> Readings,
    IReadOnlyDictionary<string, string> Charts,
    IReadOnlyList<string> Warnings,
    IReadOnlyList<string> Cautions,
    string? Command,
    double SolveMs,
    double DrawMs);

/// <summary>A figure with its name.</summary>
internal sealed record KeyFigure(string Name, string Value);

/// <summary>What formulating found.</summary>
/// <param name="Fields">Values to set.</param>
/// <param name="Reached">Whether white is on target there.</param>
/// <param name="Message">In words.</param>
internal sealed record FormulateReply(IReadOnlyDictionary<string, string> Fields, bool Reached, string Message);

/// <summary>What was saved.</summary>
/// <param name="Name">File name.</param>
/// <param name="Check">Tells this version from a later one.</param>
internal sealed record SaveReply(string Name, string Check);

/// <summary>A report that was made.</summary>
/// <param name="Folder">Relative to the film file's folder.</param>
/// <param name="Name">Its name in addresses of this page.</param>
/// <param name="Files">File names.</param>
internal sealed record ReportReply(string Folder, string Name, IReadOnlyList<string> Files);

/// <summary>A long run.</summary>
/// <param name="Id">Its number.</param>
/// <param name="DoneShare">How much is done, 0…1.</param>
/// <param name="Finished">Whether it has ended.</param>
/// <param name="Message">How it ended, in words.</param>
/// <param name="Table">Its figures beside the exact ones.</param>
internal sealed record RunReply(string Id, double DoneShare, bool Finished, string? Message, Terminal.FigureTable? Table);
