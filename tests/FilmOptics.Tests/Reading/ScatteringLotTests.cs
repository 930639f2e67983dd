namespace FilmOptics.Tests.Reading;

/// <summary>Lots that scatter by themselves: s = s(layer) + Σ s(lot) · c, by the definition of the coefficient.</summary>
public sealed class ScatteringLotTests : IDisposable
{
    private const string Key = "scattering_per_mm_per_mg_per_ml";

    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Load_LotThatScatters_AddsToItsLayerAlone()
    {
        var film = Scattering("0.5");
        Assert.Equal(0.5, film.Lots[0].ScatteringPerMmPerMgPerMl);
        Assert.Equal(0, film.Layers[0].Scattering[450]);
        Assert.Equal(12 + (0.5 * 6), film.Layers[1].Scattering[450], 12);
    }

    [Theory]
    [InlineData(0.0, 12.0)]
    [InlineData(12.0, 18.0)]
    public void WithLoadings_LotThatScatters_ScattersByTheNewLoading(double loadingMgPerMl, double expectedPerMm)
    {
        var there = Scattering("0.5").WithLoadings((_, dots) => dots.Lot.Name == "green one" ? loadingMgPerMl : dots.LoadingMgPerMl);
        Assert.Equal(expectedPerMm, there.Layers[1].Scattering[450], 12);
        var back = there.WithLoadings((_, dots) => dots.Lot.Name == "green one" ? 6 : dots.LoadingMgPerMl);
        Assert.Equal(15, back.Layers[1].Scattering[450], 12);
    }

    [Fact]
    public void WithLoadings_DotsOfAClearHostTakenAway_LeaveNothingBelowZero()
    {
        var film = _folder.Load(With("0.1").Replace("scattering_per_mm: 12", "scattering_per_mm: 0", StringComparison.Ordinal)).Film;
        var rest = film.WithLoadings((_, _) => 1.1).WithLoadings((_, _) => 0.3).WithLoadings((_, _) => 0);
        Assert.InRange(rest.Layers[1].Scattering[450], 0, 1e-15);
    }

    [Fact]
    public void WithLoadings_NoLotScatters_KeepsTheVerySpectrum()
    {
        var film = _folder.Load(FilmFolder.Whole).Film;
        Assert.Same(film.Layers[1].Scattering, film.WithLoadings((_, _) => 3).Layers[1].Scattering);
    }

    [Fact]
    public void Load_ScatteringBelowZero_IsRefusedByName()
    {
        var refused = Assert.Throws<Colorimetry.InputException>(() => Scattering("-0.1"));
        Assert.Contains(refused.Faults, fault => fault.Message.Contains($"lots[green one].{Key}", StringComparison.Ordinal) && fault.Message.Contains("at least 0", StringComparison.Ordinal));
    }

    [Fact]
    public void Load_LoadingBelowZero_IsRefusedByName()
    {
        var refused = Assert.Throws<Colorimetry.InputException>(() => _folder.Load(With("0.5").Replace("loading_mg_per_ml: 6.0", "loading_mg_per_ml: -6", StringComparison.Ordinal)));
        Assert.Contains(refused.Faults, fault => fault.Message.Contains("loading_mg_per_ml", StringComparison.Ordinal) && fault.Message.Contains("at least 0", StringComparison.Ordinal));
    }

    private Film Scattering(string perMmPerMgPerMl) => _folder.Load(With(perMmPerMgPerMl)).Film;

    private static string With(string perMmPerMgPerMl) =>
        FilmFolder.With("    film_yield_factor: 0.95", $"    film_yield_factor: 0.95\n    {Key}: {perMmPerMgPerMl}");
}
