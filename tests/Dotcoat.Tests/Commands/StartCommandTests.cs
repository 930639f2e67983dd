using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class StartCommandTests
{
    [Fact]
    public void StarterFolder_SimulatesAndFormulates()
    {
        using var workshop = new Workshop();
        workshop.Run("start", "first").AssertDone().AssertPlain();
        string film = "first/my-film.film.yaml";
        workshop.Run("simulate", film).AssertDone().AssertPlain();
        var solution = JsonNode.Parse(workshop.Run("formulate", film, "--json").AssertDone().Output)!["solution"]!;
        Assert.InRange((double)solution["white_error_xy"]!, 0, 0.0005);
        Assert.All(Directory.EnumerateFiles(workshop.PathOf("first"), "*.csv"), spectrum => workshop.Run("inspect", spectrum).AssertDone().AssertPlain());
    }

    [Fact]
    public void FilmFile_SaysAtEveryFigureWhereItComesFrom()
    {
        using var workshop = new Workshop();
        workshop.Run("start", "first").AssertDone();
        string text = workshop.Read("first/my-film.film.yaml");
        foreach (string setting in (string[])["bare light box", "one prism film", "two crossed prism films", "with a reflective polariser", "Film over dilute", "haze"])
            Assert.Contains(setting, text, StringComparison.Ordinal);
        // Every range is marked with where it comes from.
        Assert.True(text.Split("common practice, no source").Length > 15);
    }

    [Fact]
    public void FolderThatIsNotEmpty_IsNotTouched()
    {
        using var workshop = new Workshop();
        Directory.CreateDirectory(workshop.PathOf("first"));
        workshop.Write("first/notes.txt", "mine");
        workshop.Run("start", "first").AssertRefused();
        Assert.Equal(["first/notes.txt"], workshop.Files());
    }

    [Fact]
    public void EmptyFolder_IsUsed()
    {
        using var workshop = new Workshop();
        Directory.CreateDirectory(workshop.PathOf("first"));
        workshop.Run("start", "first").AssertDone();
        Assert.Contains("first/my-film.film.yaml", workshop.Files(), StringComparer.Ordinal);
    }
}
