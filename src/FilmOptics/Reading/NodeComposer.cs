using System.Globalization;
using YamlDotNet.Core;
using YamlDotNet.Core.Events;

namespace FilmOptics.Reading;

/// <summary>Makes a tree of nodes from YAML text (JSON is YAML). Plain values only: no anchors, aliases or tags.</summary>
internal sealed class NodeComposer
{
    private const int Deepest = 12;

    private readonly string _text;
    private readonly FaultList _faults;
    private readonly Place _origin;
    private readonly List<int> _lineStarts = [0];
    private readonly Parser _parser;

    private NodeComposer(string text, Place origin, FaultList faults, Parser parser)
    {
        (_text, _origin, _faults, _parser) = (text, origin, faults, parser);
        for (int i = 0; i < text.Length; i++)
        {
            // The parser counts a lone CR as a line end too.
            if (text[i] == '\n' || (text[i] == '\r' && (i + 1 == text.Length || text[i + 1] != '\n')) || text[i] is '\u0085' or '\u2028' or '\u2029')
                _lineStarts.Add(i + 1);
        }

    }

    /// <summary>The tree, or null after a fault that leaves no tree to read.</summary>
    /// <param name="text">The text.</param>
    /// <param name="origin">Place of its first character.</param>
    /// <param name="faults">Takes what is wrong.</param>
    public static Node? Compose(string text, Place origin, FaultList faults)
    {
        using var reader = new StringReader(text);
        var composer = new NodeComposer(text, origin, faults, new(reader));
        try
        {
            return composer.Document();
        }
        catch (YamlException exception)
        {
            faults.Add(composer.PlaceOfError(exception), $"This is not YAML: {composer.Explained(exception.Message)}");
            return null;
        }
        catch (UnreadableException exception)
        {
            faults.Add(exception.Place, exception.Message);
            return null;
        }
        catch (Exception exception) when (exception is InvalidOperationException or ArgumentException or IndexOutOfRangeException)
        {
            // The parser gives up this way inside some unclosed brackets.
            var last = composer._parser.Current;
            faults.Add(last is null ? origin : composer.PlaceAt(last.Start),
                "This is not YAML from here on: a bracket, brace or quotation mark is not closed, or a comma is missing.");
            return null;
        }
    }

    private Node? Document()
    {
        _parser.MoveNext(); // start of the stream
        _parser.MoveNext();
        if (_parser.Current is StreamEnd)
        {
            _faults.Add(_origin, "There is nothing here but blanks or comments; keys with values are due.");
            return null;
        }

        _parser.MoveNext(); // past the document's start
        var root = Value(depth: 0);
        _parser.MoveNext(); // the document's end
        if (_parser.MoveNext() && _parser.Current is DocumentStart second)
            throw new UnreadableException(PlaceAt(second.Start), "A second YAML document begins here; one is allowed.");
        return root;
    }

    private Node Value(int depth)
    {
        var current = _parser.Current!;
        var place = PlaceAt(current.Start);
        if (depth > Deepest)
            throw new UnreadableException(place, $"Values are nested over {Deepest} deep here; a film file needs fewer.");
        if (current is AnchorAlias alias)
            throw new UnreadableException(place, $"The alias {Shown.Quoted("*" + alias.Value)} is not allowed; write the value out.");
        if (current is NodeEvent { Anchor.IsEmpty: false } anchored)
            throw new UnreadableException(place, $"The anchor {Shown.Quoted("&" + anchored.Anchor)} is not allowed; write each value out.");
        if (current is NodeEvent { Tag: { IsEmpty: false, IsNonSpecific: false } tag })
            throw new UnreadableException(place, $"The tag {Shown.Quoted(tag.Value)} is not allowed; write the value alone.");
        return current switch
        {
            Scalar scalar => Scalar(scalar),
            SequenceStart start => List(start, depth),
            MappingStart start => Mapping(start, depth),
            _ => throw new UnreadableException(place, "A value is due here."),
        };
    }

    private ScalarNode Scalar(Scalar scalar) => new(
        scalar.Value,
        scalar.Style == ScalarStyle.Plain,
        PlaceAt(scalar.Start),
        new(OffsetAt(scalar.Start), OffsetAt(scalar.End)));

    private ListNode List(SequenceStart start, int depth)
    {
        var items = new List<Node>();
        while (_parser.MoveNext() && _parser.Current is not SequenceEnd)
            items.Add(Value(depth + 1));
        bool isFlow = start.Style == SequenceStyle.Flow;
        return new(isFlow, PlaceAt(start.Start), SpanOf(start.Start, isFlow, items.LastOrDefault()), items);
    }

    private MappingNode Mapping(MappingStart start, int depth)
    {
        var entries = new List<MappingEntry>();
        var lines = new Dictionary<string, int>(StringComparer.Ordinal);
        while (_parser.MoveNext() && _parser.Current is not MappingEnd)
        {
            var keyPlace = PlaceAt(_parser.Current!.Start);
            if (Value(depth + 1) is not ScalarNode key)
                throw new UnreadableException(keyPlace, "A list or mapping cannot be a key; a name is due.");
            _parser.MoveNext();
            var value = Value(depth + 1);
            if (!lines.TryAdd(key.Text, key.Place.Line))
                _faults.Add(key.Place, $"The key {Shown.Quoted(key.Text)} stands twice; it stands in line {lines[key.Text]} already.");
            else
                entries.Add(new(key, value));
        }

        bool isFlow = start.Style == MappingStyle.Flow;

        // A pair in a flow list, [a: 1], is a mapping without braces; its start carries no position.
        bool isPair = isFlow && (OffsetAt(start.Start) >= _text.Length || _text[OffsetAt(start.Start)] != '{');
        if (isPair && entries.Count > 0)
            return new(isFlow, entries[0].Key.Place, new(entries[0].Key.Span.Start, entries[^1].Value.Span.End), entries);
        return new(isFlow, PlaceAt(start.Start), SpanOf(start.Start, isFlow, entries.LastOrDefault()?.Value), entries);
    }

    // Block collections end with their last value: the parser's own mark lies beyond the comments that follow.
    private TextSpan SpanOf(Mark start, bool isFlow, Node? last) => new(
        OffsetAt(start), isFlow ? OffsetAt(_parser.Current!.Start) + 1 : last?.Span.End ?? OffsetAt(start));

    // By line and column: the parser's index counts CR LF as one character.
    private int OffsetAt(Mark mark)
    {
        int line = Math.Clamp((int)mark.Line, 1, _lineStarts.Count);
        return Math.Min(_text.Length, _lineStarts[line - 1] + (int)mark.Column - 1);
    }

    private Place PlaceAt(Mark mark)
    {
        // The end of a text without a last line end is marked on a line that is not there.
        bool isBeyond = mark.Line > _lineStarts.Count;
        int line = isBeyond ? _lineStarts.Count : (int)Math.Max(1, mark.Line);
        int column = isBeyond ? _text.Length - _lineStarts[^1] + 1 : (int)Math.Max(1, mark.Column);
        return line == 1
            ? _origin with { Column = _origin.Column + column - 1 }
            : new(_origin.File, _origin.Line + line - 1, column);
    }

    private Place PlaceOfError(YamlException exception) =>
        TabbedLine(exception.Message) is { } line ? new(_origin.File, _origin.Line + line, 1) : PlaceAt(exception.Start);

    private string Explained(string message) => TabbedLine(message) is not null
        ? "a tab indents this line; indent with spaces."
        : char.ToLower(message[0], CultureInfo.InvariantCulture) + message[1..].TrimEnd('.') + ".";

    // The parser marks the start of the mapping, not the tab; the line is found here.
    private int? TabbedLine(string message)
    {
        if (!message.Contains("tab", StringComparison.OrdinalIgnoreCase))
            return null;
        int line = _lineStarts.FindIndex(start => _text.AsSpan(start).TrimStart(' ') is ['\t', ..]);
        return line < 0 ? null : line;
    }

    private sealed class UnreadableException(Place place, string message) : Exception(message)
    {
        public Place Place { get; } = place;
    }
}
