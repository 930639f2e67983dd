using System.Text.Encodings.Web;
using System.Text.Json;

namespace Dotcoat.Desk;

/// <summary>How the page and the program write to each other.</summary>
internal static class DeskJson
{
    /// <summary>camelCase, and text as it is: answers are never put into a page as markup but for the charts, which are drawn here.</summary>
    public static JsonSerializerOptions Options { get; } = new(JsonSerializerDefaults.Web)
    {
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
        MaxDepth = 16,
    };
}
