using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;

namespace FilmReports;

/// <summary>One JSON object as text: indented, the same bytes everywhere, ending with a line feed.</summary>
internal static class JsonDocumentText
{
    private static readonly JsonWriterOptions Indented = new() { Indented = true, NewLine = "\n", Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <summary>The object whose properties the action writes.</summary>
    public static string Of(Action<Utf8JsonWriter> write)
    {
        using var bytes = new MemoryStream();
        using (var json = new Utf8JsonWriter(bytes, Indented))
        {
            json.WriteStartObject();
            write(json);
            json.WriteEndObject();
        }

        return Encoding.UTF8.GetString(bytes.GetBuffer(), 0, (int)bytes.Length) + "\n";
    }

    /// <summary>A number, or null where it is not known. The writer refuses NaN and infinity itself: neither ever passes for a number.</summary>
    public static void Number(this Utf8JsonWriter json, string key, double? value)
    {
        if (value is { } number)
            json.WriteNumber(key, number);
        else
            json.WriteNull(key);
    }

    /// <summary>A list of sentences.</summary>
    public static void Sentences(this Utf8JsonWriter json, string key, IEnumerable<string> sentences)
    {
        json.WriteStartArray(key);
        foreach (string sentence in sentences)
            json.WriteStringValue(sentence);
        json.WriteEndArray();
    }
}
