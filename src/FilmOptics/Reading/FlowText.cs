using System.Text.Json;

namespace FilmOptics.Reading;

/// <summary>Writes a node on one line, so that reading it gives the node back.</summary>
internal static class FlowText
{
    /// <param name="node">What to write.</param>
    /// <param name="isJson">Quote keys and text as JSON does.</param>
    public static string Of(Node node, bool isJson) => node switch
    {
        ScalarNode scalar => Scalar(scalar, isJson),
        ListNode list => $"[{string.Join(", ", list.Items.Select(item => Of(item, isJson)))}]",
        MappingNode mapping => $"{{{string.Join(", ", mapping.Entries.Select(entry => $"{Of(entry.Key, isJson)}: {Of(entry.Value, isJson)}"))}}}",
        _ => throw new ArgumentException("Scalars, lists and mappings are all there is.", nameof(node)),
    };

    private static string Scalar(ScalarNode scalar, bool isJson)
    {
        if (scalar.IsNull)
            return "null";
        bool isWord = scalar.IsPlain && !isJson && IsSafe(scalar.Text);
        return isWord || Section.TryNumber(scalar, out _) ? scalar.Text : JsonSerializer.Serialize(scalar.Text, JsonText.Plain);
    }

    private static bool IsSafe(string text) =>
        (char.IsLetterOrDigit(text[0]) || text[0] is '.' or '/') && text[^1] != ' '
        && text.All(c => char.IsLetterOrDigit(c) || c is ' ' or '_' or '.' or '-' or '/' or '(' or ')' or '°' or '+');

    private static class JsonText
    {
        public static readonly JsonSerializerOptions Plain = new() { Encoder = System.Text.Encodings.Web.JavaScriptEncoder.UnsafeRelaxedJsonEscaping };
    }
}
