using System.Collections.Frozen;

namespace Dotcoat.Desk;

/// <summary>The page's own files, built into the program.</summary>
internal static class PageFiles
{
    private const string Prefix = "desk/";

    private static readonly FrozenDictionary<string, byte[]> Files = typeof(PageFiles).Assembly.GetManifestResourceNames()
        .Where(name => name.StartsWith(Prefix, StringComparison.Ordinal))
        .ToFrozenDictionary(name => name[Prefix.Length..], Read, StringComparer.Ordinal);

    /// <summary>Names of all files.</summary>
    public static IEnumerable<string> Names => Files.Keys;

    /// <summary>A file's bytes; null where there is none of the name.</summary>
    public static byte[]? Find(string name) => Files.GetValueOrDefault(name);

    /// <summary>Media type by the name's ending.</summary>
    public static string TypeOf(string name) => Path.GetExtension(name) switch
    {
        ".html" => "text/html; charset=utf-8",
        ".css" => "text/css; charset=utf-8",
        ".js" => "text/javascript; charset=utf-8",
        ".svg" => "image/svg+xml",
        ".png" => "image/png",
        ".pdf" => "application/pdf",
        ".json" => "application/json; charset=utf-8",
        _ => "application/octet-stream",
    };

    private static byte[] Read(string name)
    {
        using var stream = typeof(PageFiles).Assembly.GetManifestResourceStream(name)!;
        using var bytes = new MemoryStream();
        stream.CopyTo(bytes);
        return bytes.ToArray();
    }
}
