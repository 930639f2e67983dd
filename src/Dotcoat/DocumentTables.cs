using System.Text;
using System.Text.Json.Nodes;

namespace Dotcoat;

/// <summary>The tables of a JSON document as CSV files: one for every list of objects, every object of lists and every object of values.</summary>
internal static class DocumentTables
{
    /// <summary>CSV files named after the keys they stand under.</summary>
    public static IEnumerable<OutputFile> Of(string json)
    {
        foreach (var (key, node) in JsonNode.Parse(json)!.AsObject())
        {
            string? csv = node switch
            {
                JsonArray { Count: > 0 } list when list[0] is JsonObject => Rows(list),
                JsonObject { Count: > 0 } columns when columns.All(c => c.Value is JsonArray) => Columns(columns),
                JsonObject values => Values(values),
                _ => null,
            };
            if (csv is not null)
                yield return new($"{key}.csv", csv);
        }
    }

    private static string Rows(JsonArray list)
    {
        var rows = list.Select(row => Leaves(row!.AsObject(), "").ToDictionary(StringComparer.Ordinal)).ToList();
        var header = rows.SelectMany(row => row.Keys).Distinct(StringComparer.Ordinal).ToList();
        return Csv(rows.Select(row => header.Select(key => row.GetValueOrDefault(key, ""))).Prepend(header));
    }

    private static string Columns(JsonObject columns)
    {
        var cells = columns.Select(column => column.Value!.AsArray().Select(Cell).ToArray()).ToList();
        var rows = Enumerable.Range(0, cells.Max(column => column.Length)).Select(i => cells.Select(column => i < column.Length ? column[i] : ""));
        return Csv(rows.Prepend(columns.Select(column => column.Key)));
    }

    private static string Values(JsonObject values) =>
        Csv(Leaves(values, "").Select(leaf => new[] { leaf.Key, leaf.Value }).Prepend(["key", "value"]));

    private static IEnumerable<KeyValuePair<string, string>> Leaves(JsonObject node, string prefix) => node.SelectMany(property =>
        property.Value is JsonObject inner ? Leaves(inner, $"{prefix}{property.Key}.") : [new($"{prefix}{property.Key}", Cell(property.Value))]);

    // Numbers keep the digits of the document; null is an empty cell.
    private static string Cell(JsonNode? node) =>
        node is null ? "" : node is JsonValue value && value.TryGetValue(out string? text) ? text : node.ToJsonString();

    private static string Csv(IEnumerable<IEnumerable<string>> lines) =>
        lines.Aggregate(new StringBuilder(), (csv, cells) => csv.AppendJoin(',', cells.Select(Quoted)).Append('\n')).ToString();

    private static string Quoted(string cell) =>
        cell.AsSpan().IndexOfAny(",\"\n\r") >= 0 ? $"\"{cell.Replace("\"", "\"\"", StringComparison.Ordinal)}\"" : cell;
}
