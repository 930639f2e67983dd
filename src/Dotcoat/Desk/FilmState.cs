using System.Globalization;
using System.Text.Json;
using System.Text.Json.Serialization;

namespace Dotcoat.Desk;

/// <summary>What a page has changed of the film file. The whole of a page's film is the file's text and this.</summary>
/// <param name="Fields">Numbers as typed, by the key that --set takes.</param>
/// <param name="Spectra">Names of dropped spectra, by the key of a lot's absorbance or emission.</param>
internal sealed record FilmState(SortedDictionary<string, string> Fields, SortedDictionary<string, string> Spectra)
{
    private const int MostEntries = 500;
    private const int LongestNumber = 40;

    public static FilmState Unchanged => new(new(StringComparer.Ordinal), new(StringComparer.Ordinal));

    [JsonIgnore]
    public bool IsUnchanged => Fields.Count == 0 && Spectra.Count == 0;

    /// <summary>The same text for the same film.</summary>
    [JsonIgnore]
    public string Fingerprint => JsonSerializer.Serialize(this, DeskJson.Options);

    /// <summary>A state that came over the wire, checked against what this film's page may change.</summary>
    /// <exception cref="FieldException">A key is not one of the page's, or a value is no number.</exception>
    public FilmState Checked(FilmControls controls, DroppedSpectra dropped)
    {
        if (Fields is null || Spectra is null || Fields.Count + Spectra.Count > MostEntries)
            throw new FieldException([new(null, "The page sent a film that is none.")]);
        var faults = new List<FieldFault>();
        foreach (var (key, text) in Fields)
        {
            if (!controls.HasField(key))
                faults.Add(new(null, $"{Short(key)} is no field of this page."));
            else if (!IsNumber(text))
                faults.Add(new(key, $"'{Short(text)}' is no number."));
        }

        foreach (var (key, name) in Spectra)
        {
            if (!controls.TakesSpectrum(key))
                faults.Add(new(null, $"{Short(key)} is no place for a spectrum."));
            else if (!dropped.Has(name))
                faults.Add(new(key, $"The dropped file {Short(name)} is not known here; drop it again."));
        }

        return faults.Count == 0 ? this : throw new FieldException(faults);
    }

    /// <summary>The overrides that --set would take, each with its key.</summary>
    [JsonIgnore]
    public IReadOnlyList<(string Key, string Override)> Overrides =>
    [
        .. Spectra.Select(spectrum => (spectrum.Key, $"{spectrum.Key}={spectrum.Value}")),
        .. Fields.Select(number => (number.Key, $"{number.Key}={number.Value.Trim()}")),
    ];

    private static bool IsNumber(string? text) =>
        text is { Length: <= LongestNumber } && double.TryParse(text.Trim(), NumberStyles.Float, CultureInfo.InvariantCulture, out double number) && double.IsFinite(number);

    private static string Short(string? text) => text is null ? "" : text.Length > LongestNumber ? $"{text[..LongestNumber]}…" : text;
}

/// <summary>Something wrong at one field of the page.</summary>
/// <param name="Field">Key of the field; null where no single field is at fault.</param>
/// <param name="Message">What was found and what is allowed.</param>
internal sealed record FieldFault(string? Field, string Message);

/// <summary>A page's film was refused.</summary>
internal sealed class FieldException(IReadOnlyList<FieldFault> faults) : Exception(string.Join(' ', faults.Select(fault => fault.Message)))
{
    public IReadOnlyList<FieldFault> Faults { get; } = faults;
}
