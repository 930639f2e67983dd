using System.Globalization;

namespace FilmOptics.Reading;

/// <summary>Lists the single values of a tree under the keys that --set takes.</summary>
internal static class WrittenValues
{
    public static IReadOnlyList<WrittenValue> Of(Node root)
    {
        var values = new List<WrittenValue>();
        Add(root, "", values);
        return values;
    }

    private static void Add(Node node, string key, List<WrittenValue> values)
    {
        switch (node)
        {
            case ScalarNode { IsNull: false } scalar:
                values.Add(new(key, scalar.Text, scalar.Place.Line, scalar.Place.Column));
                break;
            case MappingNode mapping:
                foreach (var entry in mapping.Entries)
                    Add(entry.Value, key.Length == 0 ? entry.Key.Text : $"{key}.{entry.Key.Text}", values);
                break;
            case ListNode list:
                for (int i = 0; i < list.Items.Count; i++)
                    Add(list.Items[i], $"{key}[{Named(list.Items[i]) ?? i.ToString(CultureInfo.InvariantCulture)}]", values);
                break;
        }
    }

    // A bracket in a name would end the step that --set reads.
    private static string? Named(Node item) =>
        KeyPath.NameOf(item) is { Length: > 0 } name && !name.Contains(']', StringComparison.Ordinal) ? name : null;
}
