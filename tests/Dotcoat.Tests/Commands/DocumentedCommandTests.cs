using System.Text;

namespace Dotcoat.Tests.Commands;

/// <summary>Every command that a README shows in a fenced block is run, in a copy of the repository's spectra and reports.</summary>
public sealed class DocumentedCommandTests
{
    public static TheoryData<string> Pages()
    {
        var pages = new TheoryData<string> { "README.md" };
        string reports = Path.Combine(Repository.Root, "reports");
        if (Directory.Exists(reports))
        {
            foreach (string page in Directory.EnumerateFiles(reports, "README.md", SearchOption.AllDirectories).Order(StringComparer.Ordinal))
                pages.Add(Path.GetRelativePath(Repository.Root, page));
        }

        return pages;
    }

    [Theory]
    [MemberData(nameof(Pages))]
    public void EveryCommandShown_Runs(string page)
    {
        using var workshop = new Workshop();
        Copy(workshop, "spectra");
        Copy(workshop, "reports");
        foreach (string[] command in ShownCommands.In(File.ReadAllText(Path.Combine(Repository.Root, page))))
        {
            // A desk runs until it is told to stop.
            using var stop = new CancellationTokenSource();
            if (command[0] == "desk")
                stop.CancelAfter(TimeSpan.FromSeconds(8));
            var outcome = workshop.Run(stop.Token, command[0] == "desk" ? [.. command, "--no-open"] : command);
            Assert.True(outcome.Status is 0 or 1, $"{page}: {string.Join(' ', command)}: status {outcome.Status}: {outcome.Error}");
        }
    }

    [Fact]
    public void In_ATypicalPage_FindsTheCommands()
    {
        const string page = """
            Run `dotcoat inline` not.
            ```sh
            $ dotcoat simulate a.film.yaml --set 'lots[green A12].quantum_yield=0.85'   # a comment
            dotnet run -c Release --project src/Dotcoat -- formulate b.film.yaml \
                --json > result.json
            dotnet test
            ```
            dotcoat outside
            """;
        Assert.Equal(
            "simulate|a.film.yaml|--set|lots[green A12].quantum_yield=0.85\nformulate|b.film.yaml|--json",
            string.Join('\n', ShownCommands.In(page).Select(words => string.Join('|', words))));
    }

    private static void Copy(Workshop workshop, string folder)
    {
        string from = Path.Combine(Repository.Root, folder);
        if (!Directory.Exists(from))
            return;
        foreach (string file in Directory.EnumerateFiles(from, "*", SearchOption.AllDirectories))
        {
            string to = workshop.PathOf(Path.GetRelativePath(Repository.Root, file));
            Directory.CreateDirectory(Path.GetDirectoryName(to)!);
            File.Copy(file, to);
        }
    }
}

/// <summary>The commands of this program in the fenced blocks of a page.</summary>
internal static class ShownCommands
{
    public static IEnumerable<string[]> In(string page)
    {
        bool fenced = false;
        string open = "";
        foreach (string line in page.Split('\n'))
        {
            if (line.StartsWith("```", StringComparison.Ordinal))
            {
                fenced = !fenced;
                continue;
            }

            string whole = open + line.Trim();
            open = fenced && whole.EndsWith('\\') ? whole[..^1] : "";
            if (!fenced || open.Length > 0)
                continue;
            var words = Words(whole);
            int program = words.Count > 0 && words[0] == "$" ? 1 : 0;
            if (words.Count <= program)
                continue;
            if (words[program] == "dotcoat")
                yield return [.. words.Skip(program + 1)];
            else if (words[program] == "dotnet" && words.Contains("run") && words.Contains("src/Dotcoat") && words.IndexOf("--") is > 0 and var dashes)
                yield return [.. words.Skip(dashes + 1)];
        }
    }

    // As a shell splits them: quotes, a comment, and an end at a redirection or pipe.
    private static List<string> Words(string line)
    {
        var words = new List<string>();
        var word = new StringBuilder();
        char quote = '\0';
        bool inWord = false;
        foreach (char c in line + " ")
        {
            if (quote == '\0' && !inWord && c is '#' or '>' or '|' or '&' or ';' && quote == '\0')
                break;
            if (quote != '\0' ? c == quote : c is '\'' or '"')
            {
                quote = quote == '\0' ? c : '\0';
                inWord = true;
            }
            else if (quote == '\0' && c == ' ')
            {
                if (inWord)
                    words.Add(word.ToString());
                word.Clear();
                inWord = false;
            }
            else
            {
                word.Append(c);
                inWord = true;
            }
        }

        return words;
    }
}
