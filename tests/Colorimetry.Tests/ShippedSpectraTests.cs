using System.Reflection;
using System.Text.RegularExpressions;

namespace Colorimetry.Tests;

/// <summary>What a reviewer would forget about the files in spectra/.</summary>
public sealed class ShippedSpectraTests
{
    private static readonly string Folder = Path.Combine(Repository.Root, "spectra");

    public static TheoryData<string> Files => new(Directory
        .EnumerateFiles(Folder, "*.csv", SearchOption.AllDirectories)
        .Select(f => Path.GetRelativePath(Folder, f).Replace('\\', '/'))
        .Order(StringComparer.Ordinal));

    [Theory]
    [MemberData(nameof(Files))]
    public void File_InItsFirstLines_SaysWhatItIsAndWhereFrom(string file)
    {
        string[] header = [.. File.ReadLines(Path.Combine(Folder, file)).TakeWhile(l => l.StartsWith('#'))];
        string[] keys = ["quantity", "unit", "step", "source", "licence", "obtained"];
        Assert.Equal(keys, header.Select(l => l[2..l.IndexOf(':', StringComparison.Ordinal)]).ToArray());
        Assert.All(header, l => Assert.Matches("^# [a-z]+: .{1,}$", l));
    }

    [Theory]
    [MemberData(nameof(Files))]
    public void File_ReadAsASpectrum_HasTheStepItStates(string file)
    {
        string path = Path.Combine(Folder, file);
        SpectrumTable table = SpectrumFile.Read(path);
        string stated = File.ReadLines(path).First(l => l.StartsWith("# step: ", StringComparison.Ordinal))["# step: ".Length..];
        double step = EvenSteps.Of(table.WavelengthsNm) ?? 0;
        Assert.Equal(stated, string.Create(System.Globalization.CultureInfo.InvariantCulture, $"{step:0.###} nm"));
    }

    // What a user begins with is brought to the grid without a word of warning.
    [Theory]
    [MemberData(nameof(Files))]
    public void File_OfTheDemo_IsImportedWithoutAWarning(string file)
    {
        if (!file.StartsWith("demo/", StringComparison.Ordinal))
            return;
        SpectrumTable table = SpectrumFile.Read(Path.Combine(Folder, file));
        foreach (string column in table.Columns)
        {
            IReadOnlyList<string> warnings = column switch
            {
                "power_per_nm" => SpectrumImport.ToGrid<WattPerNm>(table, column, ImportOptions.Default).Warnings,
                "photons_per_nm" => SpectrumImport.ToGrid<PhotonPerNm>(table, column, ImportOptions.Default).Warnings,
                "absorbance_per_cm" => SpectrumImport.ToGrid<AbsorbancePerCm>(table, column, ImportOptions.Default).Warnings,
                _ => SpectrumImport.ToGrid<Fraction>(table, column, ImportOptions.Default).Warnings,
            };
            Assert.Empty(warnings);
        }
    }

    [Fact]
    public void EmbeddedFiles_AreThoseOnDisk()
    {
        Assembly colorimetry = typeof(SpectrumFile).Assembly;
        string[] onDisk = [.. Files.Select(f => f.Data).Where(f => !f.StartsWith("demo/", StringComparison.Ordinal))];
        Assert.Equal(onDisk, colorimetry.GetManifestResourceNames().Order(StringComparer.Ordinal).ToArray());
        foreach (string name in onDisk)
        {
            using Stream embedded = colorimetry.GetManifestResourceStream(name)!;
            using var copy = new MemoryStream();
            embedded.CopyTo(copy);
            Assert.Equal(File.ReadAllBytes(Path.Combine(Folder, name)), copy.ToArray());
        }
    }

    [Fact]
    public void Sources_ListEveryFileAndNoOther()
    {
        string sources = File.ReadAllText(Path.Combine(Folder, "SOURCES.md"));
        string[] listed = [.. Regex.Matches(sources, @"^\| `(?<file>[^`]+)` \|", RegexOptions.Multiline | RegexOptions.ExplicitCapture, TimeSpan.FromSeconds(5))
            .Select(m => m.Groups["file"].Value).Order(StringComparer.Ordinal)];
        Assert.Equal(Files.Select(f => f.Data).ToArray(), listed);
    }
}
