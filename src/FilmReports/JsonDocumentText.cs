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
}
