namespace FilmOptics.Reading;

/// <summary>Changes values in the text of a film file and leaves every other character as it stands.</summary>
internal static class TextEditor
{
    /// <summary>The text with one override in it.</summary>
    /// <param name="text">The text.</param>
    /// <param name="root">Its tree.</param>
    /// <param name="change">The override.</param>
    /// <param name="target">Where it leads in the tree.</param>
    public static string With(string text, MappingNode root, KeyOverride change, KeyTarget target)
    {
        bool isJson = root.IsFlow && text[root.Entries.FirstOrDefault()?.Key.Span.Start ?? 0] == '"';
        string value = FlowText.Of(change.NewValue(target), isJson);
        if (target.Value is null)
            return WithKey(text, (MappingNode)target.Owner, $"{FlowText.Of(new ScalarNode(target.Rest[0].Text, true, default, default), isJson)}: {value}");
        var span = target.Value.Span;
        if (target.Value is ScalarNode { IsNull: false })
            return Replaced(text, span, value);

        // From the key on, for a block below the key gives way to one line beside it.
        return target.Entry is { } entry
            ? Replaced(text, new(entry.Key.Span.End, span.End), $": {value}")
            : Replaced(text, span, span.Start == span.End ? $" {value}" : value);
    }

    /// <summary>The text with scalars replaced, each by new text.</summary>
    public static string With(string text, IEnumerable<(TextSpan Span, string Value)> changes) => changes
        .DistinctBy(change => change.Span.Start)
        .OrderByDescending(change => change.Span.Start)
        .Aggregate(text, (edited, change) => Replaced(edited, change.Span, change.Value));

    private static string Replaced(string text, TextSpan span, string value)
    {
        // A block scalar's span takes in its last line's end.
        bool takesLineEnd = span.End > span.Start && text[span.End - 1] == '\n';
        return string.Concat(text.AsSpan(0, span.Start), value, takesLineEnd ? "\n" : "", text.AsSpan(span.End));
    }

    private static string WithKey(string text, MappingNode owner, string pair)
    {
        if (owner.Entries.Count == 0)
            return text.Insert(owner.Span.Start + 1, pair);
        int end = owner.Entries[^1].Value.Span.End;
        if (owner.IsFlow)
            return text.Insert(end, $", {pair}");
        string indent = new(' ', owner.Place.Column - 1);
        string lineEnd = text.Contains("\r\n", StringComparison.Ordinal) ? "\r\n" : "\n";
        if (end > 0 && text[end - 1] == '\n')
            return text.Insert(end, indent + pair + lineEnd);
        int next = text.IndexOf('\n', end);
        return next < 0 ? text + lineEnd + indent + pair + lineEnd : text.Insert(next + 1, indent + pair + lineEnd);
    }
}
