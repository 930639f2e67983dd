namespace FilmOptics.Reading;

/// <summary>Where something stands: a file (or a command-line option), line and column from 1.</summary>
internal readonly record struct Place(string File, int Line, int Column);

/// <summary>A stretch of the text a node was read from; empty at 0 for nodes that options added.</summary>
internal readonly record struct TextSpan(int Start, int End);

/// <summary>One value of a film file with its place. Options edit the tree before it is read.</summary>
internal abstract class Node(Place place, TextSpan span)
{
    public Place Place { get; } = place;

    public TextSpan Span { get; } = span;

    /// <summary>What stands here, in words for a message.</summary>
    public abstract string Described { get; }

    /// <summary>True for an empty value, ~ or null.</summary>
    public virtual bool IsNull => false;
}

/// <summary>Text, number or nothing.</summary>
internal sealed class ScalarNode(string text, bool isPlain, Place place, TextSpan span) : Node(place, span)
{
    public string Text { get; } = text;

    /// <summary>Written without quotes: only such a scalar can be a number.</summary>
    public bool IsPlain { get; } = isPlain;

    public override bool IsNull => IsPlain && Text is "" or "~" or "null" or "Null" or "NULL";

    public override string Described => IsNull ? "no value" : Shown.Quoted(Text);
}

/// <summary>Keys with values, in the order of the file.</summary>
internal sealed class MappingNode(bool isFlow, Place place, TextSpan span, List<MappingEntry> entries) : Node(place, span)
{
    public bool IsFlow { get; } = isFlow;

    public List<MappingEntry> Entries { get; } = entries;

    public override string Described => "a mapping";

    public MappingEntry? Find(string key) => Entries.Find(entry => entry.Key.Text == key);

    /// <summary>Puts a value in, in place of one of that key.</summary>
    public void Set(ScalarNode key, Node value)
    {
        int at = Entries.FindIndex(entry => entry.Key.Text == key.Text);
        if (at < 0)
            Entries.Add(new(key, value));
        else
            Entries[at] = new(key, value);
    }
}

/// <summary>A key with its value.</summary>
internal sealed record MappingEntry(ScalarNode Key, Node Value);

/// <summary>Values in order.</summary>
internal sealed class ListNode(bool isFlow, Place place, TextSpan span, List<Node> items) : Node(place, span)
{
    public bool IsFlow { get; } = isFlow;

    public List<Node> Items { get; } = items;

    public override string Described => "a list";
}
