namespace Colorimetry.Tests;

/// <summary>Rows of a CSV in the Data folder beside these tests: comments and the header left out, quotes removed.</summary>
internal static class DataRows
{
    public static IReadOnlyList<string[]> Read(string name) =>
        [.. File.ReadLines(Path.Combine(Repository.Root, "tests", "Colorimetry.Tests", "Data", name))
            .Where(line => line.Length > 0 && line[0] != '#')
            .Skip(1)
            .Select(Fields)];

    // Only the last field, the source, may hold commas and quotes.
    private static string[] Fields(string line)
    {
        int quote = line.IndexOf(",\"", StringComparison.Ordinal);
        return quote < 0 ? line.Split(',') : [.. line[..quote].Split(','), line[(quote + 2)..^1]];
    }
}
