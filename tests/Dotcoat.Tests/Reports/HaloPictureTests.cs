using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

/// <summary>The picture of reports/halo is that of its three films, and shows what its README says.</summary>
public sealed class HaloPictureTests
{
    private static readonly Lazy<(string Name, ZoneProfile Profile)[]> Profiles = new(() =>
    [
        .. new[] { ("A", 0), ("B", 10), ("C", 30) }.Select(film => (film.Item1, Of(film.Item2))),
    ]);

    [Fact]
    public void Picture_Redrawn_IsTheApprovedOne()
    {
        string path = Path.Combine(Folder, "halo.png");
        byte[] png = CanvasRenderer.Png(ZoneChart.Of(Profiles.Value, Palette.Light), Palette.Light.Ground);
        if (Environment.GetEnvironmentVariable("DOTCOAT_APPROVE") == "1")
            File.WriteAllBytes(path, png);
        Assert.Null(ApprovedPicture.Difference(File.ReadAllBytes(path), png));
    }

    [Fact]
    public void Halo_WithMoreScattering_IsShorterAndNeverBluerThanTheZone()
    {
        double[] reachesMm = [.. Profiles.Value.Select(p => p.Profile.Points.Where(point => point.LuminanceShare >= 0.002).Max(point => point.DistanceMm))];
        Assert.Equal(reachesMm.OrderDescending().ToArray(), reachesMm);
        Assert.True(reachesMm[0] > 29, "without scattering the halo fills the next zone");
        Assert.True(reachesMm[1] < 13 && reachesMm[2] < 12);
        foreach (var (_, profile) in Profiles.Value)
        {
            var centre = profile.Points[0].Chromaticity!.Value;
            Assert.All(profile.Points.Where(p => p.DistanceMm > 10.3 && p.LuminanceShare > 0.002), p => Assert.True(p.Chromaticity!.Value.UPrime > centre.UPrime && p.Chromaticity.Value.VPrime > centre.VPrime));
        }
    }

    private static string Folder => Path.Combine(Commands.Repository.Root, "reports", "halo");

    private static ZoneProfile Of(int scattering)
    {
        string file = string.Create(System.Globalization.CultureInfo.InvariantCulture, $"scattering-{scattering}.film.yaml");
        var filmCase = FilmFile.Load(Path.Combine(Folder, file), []);
        return LateralSpread.Trace(filmCase.Film, cancellationToken: TestContext.Current.CancellationToken).AcrossZone(20, filmCase.Observer);
    }
}
