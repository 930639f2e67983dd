using System.CommandLine;

namespace Dotcoat.Commands;

/// <summary>What commands on one film file have in common.</summary>
internal static class FilmCommand
{
    /// <summary>The FILE argument.</summary>
    public static Argument<string> File() => new("FILE") { Description = "Film file, NAME.film.yaml." };

    /// <summary>The name a film file's results go by: its own, without .film.yaml.</summary>
    public static string NameOf(string path)
    {
        string name = Path.GetFileName(path);
        foreach (string ending in (string[])[".film.yaml", ".film.yml", ".film.json", ".yaml", ".yml", ".json"])
        {
            if (name.Length > ending.Length && name.EndsWith(ending, StringComparison.OrdinalIgnoreCase))
                return name[..^ending.Length];
        }

        return name;
    }
}
