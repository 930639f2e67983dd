using System.Collections.Concurrent;
using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using System.Xml.Linq;
using FilmDesign;
using FilmOptics;
using FilmReports;
using FilmReports.Pages;

namespace Dotcoat.Tests.Reports;

public sealed class FilmReportTests
{
    private static readonly ConcurrentDictionary<string, IReadOnlyList<ReportFile>> Written = new(StringComparer.Ordinal);

    public static TheoryData<string> Films => ReportFilms.Names;

    [Theory]
    [InlineData("desk-monitor")]
    [InlineData("traced")]
    public void Write_Twice_GivesTheSameBytes(string film)
    {
        var (filmCase, appraisal) = ReportFilms.Named(film);
        var (first, second) = (FilmReport.Write(filmCase, appraisal, null), FilmReport.Write(filmCase, appraisal, null));
        Assert.Equal(first.Select(f => f.Name).ToArray(), second.Select(f => f.Name).ToArray());
        Assert.All(first.Zip(second), pair => Assert.Equal(pair.First.Bytes, pair.Second.Bytes));
    }

    [Fact]
    public void Write_GivesAPageTheDocumentAndEachChartTwice() => Assert.Equal(
        (string[])[
            "chromaticity-1931.png", "chromaticity-1931.svg", "chromaticity-1976.png", "chromaticity-1976.svg", "lots.png", "lots.svg",
            "photon-fates.png", "photon-fates.svg", "report.html", "report.pdf", "simulate.json", "spectrum.png", "spectrum.svg",
        ],
        Files("desk-monitor").Select(f => f.Name).Order(StringComparer.Ordinal).ToArray());

    [Theory]
    [MemberData(nameof(Films))]
    public void Page_IsWholeAndAsksForNothing(string film)
    {
        string text = Html(film);
        Assert.StartsWith("<!DOCTYPE html>\n<html lang=\"en\">", text, StringComparison.Ordinal);
        var page = Parse(text);
        Assert.DoesNotContain(page.Descendants(), e => e.Name.LocalName is "script" or "link" or "iframe" or "img" or "image" or "object" or "form" or "a");
        Assert.DoesNotContain(page.DescendantsAndSelf().Attributes(), a => a.Name.LocalName is "src" or "href" || a.Name.LocalName.StartsWith("on", StringComparison.Ordinal));
        // The one address is the name of the SVG namespace.
        Assert.All(Regex.Matches(text, "https?://[^\"' ]*", RegexOptions.None, TimeSpan.FromSeconds(5)), m => Assert.Equal("http://www.w3.org/2000/svg", m.Value));
        Assert.DoesNotContain("@import", text, StringComparison.Ordinal);
        Assert.DoesNotMatch(@"url\((?!#[a-z0-9-]+\))", text);
        Assert.Contains("prefers-color-scheme: dark", text, StringComparison.Ordinal);
        Assert.Contains("@media print", text, StringComparison.Ordinal);
        string[] ids = [.. page.Descendants().Attributes("id").Select(a => a.Value)];
        Assert.Equal(ids.Distinct(StringComparer.Ordinal).ToArray(), ids);
        Assert.Equal(5, page.Descendants("figure").Count());
        Assert.All(page.Descendants("table"), t => Assert.Single(t.Descendants("tr").Select(r => r.Elements().Count()).Distinct()));
    }

    [Theory]
    [MemberData(nameof(Films))]
    public void Page_HasNoNumberThatIsNoneNoMachineAndTrueMinus(string film)
    {
        string text = string.Concat(Parse(Html(film)).Descendants("body").Single().DescendantNodes().OfType<XText>().Select(t => $" {t.Value} "));
        Assert.DoesNotContain("NaN", text, StringComparison.Ordinal);
        Assert.DoesNotContain("Infinity", text, StringComparison.Ordinal);
        Assert.DoesNotContain(Environment.MachineName, text, StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotContain(Path.GetTempPath(), text, StringComparison.Ordinal);
        Assert.DoesNotContain(Commands.Repository.Root, text, StringComparison.Ordinal);
        Assert.DoesNotContain(Environment.UserName + "@", text, StringComparison.Ordinal);
        Assert.DoesNotMatch(@"(^|\s)-\d", text);
        Assert.DoesNotContain(" %", text, StringComparison.Ordinal);
    }

    [Fact]
    public void Page_SaysTheAnswerFirstThenEverything()
    {
        string text = Parse(Html("desk-monitor")).Descendants("body").Single().Value;
        string[] inOrder =
        [
            "Desk monitor, cadmium-based demo", "Model: discrete-ordinates, estimated error", "Panel white is at x 0.31", "on target", "blue leakage", "coverage of BT.2020 in xy", "coverage of BT.2020 in u′v′",
            "White and primaries", "area ratio", "Photon budget", "down-conversion efficiency", "converted photons leaving above per source photon absorbed by dots",
            "Recipe", "wt%", "vol%", "g/m²", "optical density", "Input", "Warnings", "Cautions", "IEC 62471", "2011/65/EU", "safety data sheets",
        ];
        int at = 0;
        foreach (string phrase in inOrder)
        {
            int found = text.IndexOf(phrase, at, StringComparison.Ordinal);
            Assert.True(found >= 0, $"'{phrase}' is missing after '{text[Math.Max(0, at - 40)..at]}'");
            at = found;
        }
    }

    [Theory]
    [InlineData("desk-monitor")]
    [InlineData("six lots")]
    [InlineData("traced")]
    public void Page_LinesOfTheBudget_AddUpToTheSumShown(string film)
    {
        var (filmCase, appraisal) = ReportFilms.Named(film);
        var table = Table(film, "Photon budget");
        double[] shares = [.. table.Select(row => double.Parse(row[1], CultureInfo.InvariantCulture))];
        Assert.Equal("sum", table[^1][0]);
        Assert.Equal(6 + filmCase.Film.Lots.Count + 1, shares.Length);
        double halfDigit = 0.5 * Math.Pow(10, -Digits.ShareDecimals(appraisal.Output));
        Assert.Equal(shares[^1], shares[..^1].Sum(), shares.Length * halfDigit);
        Assert.Equal(1, shares[^1], halfDigit);
    }

    // Recipe by hand: mg/mL x mm = g/m²; wt% = mg/mL / 10 / layer density; layer density from volumes that add (definitions, ISO 80000-9).
    [Fact]
    public void Page_Recipe_FollowsFromDensitiesByHand()
    {
        var film = ReportFilms.Named("desk-monitor").Case.Film;
        double[] loadings = [.. film.Layers[0].Dots.Select(d => d.LoadingMgPerMl)];
        double volumeShare = (loadings[0] / 1900) + (loadings[1] / 2100);
        double density = ((1 - volumeShare) * 1.12) + ((loadings[0] + loadings[1]) / 1000);
        var rows = Table("desk-monitor", "Dots with their ligand");
        string[] expected =
        [
            "green K07 in dot layer", Fixed(loadings[0]), Fixed(loadings[0] / 10 / density), Fixed(loadings[0] / 19), Fixed(loadings[0] * 0.09),
        ];
        Assert.Equal(expected, rows[0]);
        Assert.Equal(2, rows.Count);

        static string Fixed(double value) => value.ToString("F3", CultureInfo.InvariantCulture);
    }

    [Fact]
    public void Page_OfATracedFilm_ShowsErrorsAndNoMoreDigitsThanTheySupport()
    {
        var output = ReportFilms.Named("traced").Appraisal.Output;
        // 20 000 photons: the largest standard error is √(0.25/20 000) = 0.0035 at most, so three decimals.
        Assert.Equal(3, Digits.ShareDecimals(output));
        var rows = Table("traced", "Photon budget");
        Assert.All(rows, row => Assert.Matches(@"^\d\.\d{3}$", row[1]));
        Assert.All(rows.SkipLast(1), row => Assert.True(double.Parse(row[2], CultureInfo.InvariantCulture) < 0.004));
        Assert.Contains("20\u2009000 photons traced, seed 1", Html("traced"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(2.34e-5, 2, "2.3\u2009×\u200910⁻⁵")]
    [InlineData(-1.5e7, 2, "−1.5\u2009×\u200910⁷")]
    [InlineData(0.000512, 2, "0.00051")]
    [InlineData(598, 6, "598")]
    [InlineData(1234.56, 3, "1230")]
    [InlineData(-0.8, 3, "−0.8")]
    [InlineData(0, 3, "0")]
    public void Significant_KeepsDigitsAndWritesPowersOfTen(double value, int digits, string expected) => Assert.Equal(expected, Digits.Significant(value, digits));

    [Theory]
    [InlineData(3e-5, 5)]
    [InlineData(1e-4, 4)]
    [InlineData(3e-3, 3)]
    [InlineData(1e-9, 5)]
    public void ShareDecimals_FollowTheStatedError(double error, int decimals) => Assert.Equal(
        decimals, Digits.ShareDecimals(ReportFilms.Named("desk-monitor").Appraisal.Output with { Accuracy = new SolverAccuracy(error, error, 8, 8, 471) }));

    [Fact]
    public void Page_OfAnotherScript_WritesNamesInFullAndSaysWhatChartsCallThem()
    {
        string text = Html("other script");
        Assert.Contains("In the charts, lot 1 stands for 绿色 K07", text, StringComparison.Ordinal);
        Assert.Contains("绿色 K07 in dot layer", text, StringComparison.Ordinal);
        Assert.Contains("lot 1", Encoding.UTF8.GetString(Files("other script").Single(f => f.Name == "spectrum.svg").Bytes), StringComparison.Ordinal);
    }

    [Fact]
    public void Page_OfMarkupInAName_ShowsItAsText()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        var named = filmCase with { Film = filmCase.Film with { Title = "<script>alert(1)</script> & \"more\"" } };
        string html = Encoding.UTF8.GetString(FilmReport.Write(named, appraisal, null)[0].Bytes);
        Assert.DoesNotContain("<script", html, StringComparison.Ordinal);
        Assert.Equal(named.Film.Title, Parse(html).Descendants("h1").Single().Value);
    }

    [Fact]
    public void Page_OfAWhiteThatCannotBeReached_SaysWhy()
    {
        var filmCase = ReportFilms.Demo("desk-monitor", "target.white_xy=[0.4, 0.05]");
        var formulation = LoadingSolver.Formulate(filmCase, new BeerLambertModel(), TestContext.Current.CancellationToken);
        Assert.False(formulation.Reached);
        var files = FilmReport.Write(formulation.FilmCase, formulation.Appraisal, formulation);
        Assert.Contains(files, f => f.Name == "formulate.json");
        Assert.Equal(formulation.Limit, Parse(Encoding.UTF8.GetString(files[0].Bytes)).Descendants("p").Single(p => (string?)p.Attribute("class") == "found").Value);
    }

    [Fact]
    public void Page_OfAWhiteOffTarget_SaysWhatToDo()
    {
        string found = Parse(Html("off target")).Descendants("p").Single(p => (string?)p.Attribute("class") == "found").Value;
        Assert.Contains("off target", found, StringComparison.Ordinal);
        Assert.Contains("formulate", found, StringComparison.Ordinal);
    }

    private static IReadOnlyList<ReportFile> Files(string film) => Written.GetOrAdd(film, static name =>
    {
        var (filmCase, appraisal) = ReportFilms.Named(name);
        return FilmReport.Write(filmCase, appraisal, null);
    });

    private static string Html(string film) => Encoding.UTF8.GetString(Files(film).Single(f => f.Name == "report.html").Bytes);

    private static XElement Parse(string html) => XDocument.Parse(html["<!DOCTYPE html>\n".Length..]).Root!;

    private static List<string[]> Table(string film, string caption) =>
    [
        .. Parse(Html(film)).Descendants("table").Single(t => t.Element("caption")!.Value.StartsWith(caption, StringComparison.Ordinal))
            .Element("tbody")!.Elements("tr").Select(row => row.Elements().Select(cell => cell.Value).ToArray()),
    ];
}
