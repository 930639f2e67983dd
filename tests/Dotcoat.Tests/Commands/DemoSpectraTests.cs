namespace Dotcoat.Tests.Commands;

public sealed class DemoSpectraTests
{
    // To make the files anew after a change here: DOTCOAT_REMAKE_DEMO=1 dotnet run --project tests/Dotcoat.Tests -- -class "*DemoSpectraTests"
    [Fact]
    public void DemoFiles_EqualWhatTheGeneratorMakes()
    {
        string folder = Path.Combine(Repository.Root, "spectra", "demo");
        bool remake = Environment.GetEnvironmentVariable("DOTCOAT_REMAKE_DEMO") == "1";
        foreach (var (name, text) in DemoSpectra.Files())
        {
            string path = Path.Combine(folder, name);
            if (remake)
                File.WriteAllText(path, text);
            Assert.Equal(text, File.ReadAllText(path));
        }

        var made = DemoSpectra.Files().Select(f => f.Name).Order(StringComparer.Ordinal);
        var present = Directory.EnumerateFiles(folder, "*.csv").Select(f => Path.GetFileName(f)!).Order(StringComparer.Ordinal);
        Assert.Equal(made, present);
    }
}
