using System.Globalization;

namespace FilmOptics.Reading;

/// <summary>Reads one mapping of the film file key by key, and names the keys it was never asked for.</summary>
/// <remarks>After a fault a number is NaN and anything else null; reading goes on, and the faults keep the result from use.</remarks>
internal sealed class Section(MappingNode node, string path, FaultList faults)
{
    private const NumberStyles NumberForm = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;

    private readonly List<string> _known = [];

    public Place Place => node.Place;

    /// <summary>The section as --set writes it, such as lots[green A12]; empty for the whole file.</summary>
    public string Path { get; set; } = path;

    public FaultList Faults => faults;

    /// <summary>A key of this section in full.</summary>
    public string PathOf(string key) => Path.Length == 0 ? key : $"{Path}.{key}";

    public bool Has(string key) => Find(key) is not null;

    /// <summary>The value as it stands, or null.</summary>
    public Node? Find(string key)
    {
        if (!_known.Contains(key))
            _known.Add(key);
        return node.Find(key)?.Value;
    }

    /// <summary>The value, or null with a fault.</summary>
    public Node? Required(string key)
    {
        var value = Find(key);
        if (value is null)
            faults.Add(Place, $"{(Path.Length == 0 ? "The file" : Path)} has no {key}; it is required.");
        return value;
    }

    public void Fault(string key, string message) => faults.Add(Find(key)?.Place ?? Place, message);

    public double RequiredNumber(string key, NumberRule rule) => Required(key) is { } value ? NumberOf(value, key, rule) : double.NaN;

    public double Number(string key, NumberRule rule, double fallback) => OptionalNumber(key, rule) ?? fallback;

    public double? OptionalNumber(string key, NumberRule rule) => Find(key) is { } value ? NumberOf(value, key, rule) : null;

    /// <summary>A number that keeps the rule, or NaN with a fault.</summary>
    public double NumberOf(Node value, string key, NumberRule rule)
    {
        if (value is not ScalarNode scalar || !TryNumber(scalar, out double number))
        {
            faults.Add(value.Place, $"{PathOf(key)} is {value.Described}; a number is due, {rule.Words}{Hint(value)}.");
            return double.NaN;
        }

        if (rule.Allows(number))
            return number;
        faults.Add(value.Place, $"{PathOf(key)} is {scalar.Text}; allowed is {rule.Words}.");
        return double.NaN;
    }

    public static bool TryNumber(Node node, out double number)
    {
        number = double.NaN;
        return node is ScalarNode { IsPlain: true, Text: [(>= '0' and <= '9') or '+' or '-' or '.', ..] text }
            && double.TryParse(text, NumberForm, CultureInfo.InvariantCulture, out number)
            && double.IsFinite(number);
    }

    private static string Hint(Node value) => value switch
    {
        ScalarNode { IsNull: true } => "; leave the key out for its default",
        ScalarNode { IsPlain: false } quoted when double.TryParse(quoted.Text, CultureInfo.InvariantCulture, out _) => ", without quotation marks",
        ScalarNode { Text: var text } when text.Contains(',', StringComparison.Ordinal)
            && double.TryParse(text.Replace(',', '.'), CultureInfo.InvariantCulture, out _) => ", with a decimal point",
        ScalarNode { Text: [>= '0' and <= '9', ..] } => ", without a unit: the key has it",
        _ => "",
    };

    public string? RequiredText(string key) => Required(key) is { } value ? TextOf(value, PathOf(key)) : null;

    public string? OptionalText(string key) => Find(key) is { } value ? TextOf(value, PathOf(key)) : null;

    /// <summary>One line of text that is not empty, or null with a fault.</summary>
    public string? TextOf(Node value, string fullKey)
    {
        if (value is ScalarNode { IsNull: false } scalar && !string.IsNullOrWhiteSpace(scalar.Text))
        {
            // Reports and charts are made of it.
            if (Shown.IsOneLine(scalar.Text))
                return scalar.Text;
            faults.Add(value.Place, $"{fullKey} is {scalar.Described}, which holds a line end or another character that is no text; one line of text is due.");
            return null;
        }

        faults.Add(value.Place, $"{fullKey} is {(value is ScalarNode { IsNull: false } ? "empty" : value.Described)}; text is due.");
        return null;
    }

    /// <summary>A word of a list of words; null with a fault, or where the key is absent.</summary>
    public string? Word(string key, params string[] allowed) => Find(key) is { } value ? WordOf(value, PathOf(key), allowed) : null;

    public string? WordOf(Node value, string fullKey, params string[] allowed)
    {
        if (value is ScalarNode scalar && allowed.Contains(scalar.Text))
            return scalar.Text;
        string nearest = value is ScalarNode { IsNull: false } text && Shown.Nearest(text.Text, allowed) is { } word
            ? $" (nearest: {word})" : "";
        faults.Add(value.Place, $"{fullKey} is {value.Described}; allowed is {string.Join(", ", allowed)}{nearest}.");
        return null;
    }

    /// <summary>A section within this one; null where it is absent or empty, or with a fault.</summary>
    public Section? Inner(string key, bool isRequired = false)
    {
        var value = isRequired ? Required(key) : Find(key);
        if (value is null || (value.IsNull && !isRequired))
            return null;
        return SectionOf(value, PathOf(key));
    }

    public Section? SectionOf(Node value, string fullKey)
    {
        if (value is MappingNode mapping)
            return new(mapping, fullKey, faults);
        faults.Add(value.Place, $"{fullKey} is {value.Described}; a mapping is due (key: value).");
        return null;
    }

    /// <summary>The items of a list; none where it is absent or empty, null with a fault.</summary>
    public IReadOnlyList<Node>? List(string key)
    {
        var value = Find(key);
        if (value is null || value.IsNull)
            return [];
        if (value is ListNode list)
            return list.Items;
        faults.Add(value.Place, $"{PathOf(key)} is {value.Described}; a list is due.");
        return null;
    }

    /// <summary>Names every key that nobody asked for.</summary>
    public void Close()
    {
        foreach (var (key, _) in node.Entries)
        {
            if (_known.Contains(key.Text))
                continue;
            string where = Path.Length == 0 ? "a film file" : Path;
            string comma = key.Text.Length > 0 && key.Text.All(char.IsAsciiDigit) ? " A decimal comma? Write a decimal point." : "";
            faults.Add(key.Place, $"The key {Shown.Quoted(key.Text)} is not known in {where}; the nearest is {Shown.Nearest(key.Text, _known)}.{comma}");
        }
    }
}
