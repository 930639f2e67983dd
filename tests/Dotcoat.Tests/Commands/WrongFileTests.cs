namespace Dotcoat.Tests.Commands;

/// <summary>Wrong files of our own making, through the whole program: one clear line each, and nothing on standard output.</summary>
public sealed class WrongFileTests
{
    private const string Film = "spectra/demo/desk-monitor.film.yaml";

    /// <summary>A change to the monitor's film file and what its one line has to say.</summary>
    [Theory]
    [InlineData("absorption_per_mm: 0.002", "absorbtion_per_mm: 0.002", "absorption_per_mm")]
    [InlineData("thickness_um: 90", "thickness_um: -90", "-90")]
    [InlineData("thickness_um: 90", "thickness_um: thin", "thin")]
    [InlineData("quantum_yield: 0.95", "quantum_yield: 1.2", "1.2")]
    [InlineData("above_reflectance: 0.58", "above_reflectance: 0.99", "absorptance")]
    [InlineData("{lot: red K23,", "{lot: red K24,", "red K24")]
    [InlineData("refractive_index: 1.50", "refractive_index: 0.5", "0.5")]
    [InlineData("spectrum: led-blue-455.csv", "spectrum: led-blue-999.csv", "led-blue-999.csv")]
    [InlineData("absorbance: red-k23-absorbance.csv", "absorbance: red-k23-emission.csv", "absorbance_per_cm")]
    [InlineData("at: panel", "at: pannel", "pannel")]
    public void FilmFile_WithOneFault_IsOneLineWithItsPlace(string right, string wrong, string expected)
    {
        using var workshop = Workshop.WithDemo();
        string text = workshop.Read(Film);
        Assert.Contains(right, text, StringComparison.Ordinal);
        workshop.Write(Film, Replaced(text, right, wrong));
        string error = workshop.Run("simulate", Film).AssertRefused().Error;
        Assert.Contains(expected, error, StringComparison.Ordinal);
        Assert.Matches(@"\A\S+\.(film\.yaml|csv)(:\d+)?(:\d+)?: ", error);
    }

    [Fact]
    public void FilmFile_WithThreeFaults_IsThreeLines()
    {
        using var workshop = Workshop.WithDemo();
        string text = Replaced(Replaced(Replaced(workshop.Read(Film), "thickness_um: 90", "thickness_um: -90"), "quantum_yield: 0.95", "quantum_yield: 1.2"), "at: panel", "at: pannel");
        workshop.Write(Film, text);
        workshop.Run("simulate", Film, "--json").AssertRefused(lines: 3);
    }

    /// <summary>A spectrum's text and what its one line has to say.</summary>
    [Theory]
    [InlineData("", "no rows")]
    [InlineData("wavelength_nm\n400\n410\n", "column")]
    [InlineData("wavelength_nm,power_per_nm\n440,0\n450,one\n460,0\n", "3")]
    [InlineData("wavelength_nm,power_per_nm\n440,0\n450,NaN\n460,0\n", "NaN")]
    [InlineData("wavelength_nm,power_per_nm\n440,0\n450,1\n450,1\n460,0\n", "450")]
    [InlineData("wavelength_nm,power_per_nm\n440,0\n450\n460,0\n", "3")]
    public void Spectrum_WithAFault_IsOneLineWithItsPlace(string text, string expected)
    {
        using var workshop = new Workshop();
        workshop.Write("light.csv", text);
        string error = workshop.Run("inspect", "light.csv").AssertRefused().Error;
        Assert.StartsWith("light.csv", error, StringComparison.Ordinal);
        Assert.Contains(expected, error["light.csv".Length..], StringComparison.Ordinal);
    }

    [Fact]
    public void Spectrum_ThatIsBinary_IsOneLine()
    {
        using var workshop = new Workshop();
        byte[] bytes = new byte[5000];
        new Random(1).NextBytes(bytes);
        File.WriteAllBytes(workshop.PathOf("light.csv"), bytes);
        workshop.Run("inspect", "light.csv").AssertRefused();
    }

    private static string Replaced(string text, string right, string wrong)
    {
        int at = text.IndexOf(right, StringComparison.Ordinal);
        return text[..at] + wrong + text[(at + right.Length)..];
    }
}
