using Colorimetry;
using FilmOptics;
using FilmOptics.Tests;

namespace FilmDesign.Tests;

/// <summary>The yield in film from a piece of film in a sphere.</summary>
public sealed class FilmYieldFitTests
{
    private static readonly Spectrum<PhotonPerNm> Pump = Spectrum.Gaussian<PhotonPerNm>(450, 8).NormalisedToUnitSum();

    [Theory]
    [InlineData(0.97)]
    [InlineData(0.7)]
    public void Factor_BehindAnExternalYield_IsFoundAgain(double factor)
    {
        // What the tracer counts of the same piece in the dark: all light that leaves, each photon by itself.
        var film = PieceOf(factor);
        var dark = film with
        {
            Backlight = film.Backlight with { Photons = Pump, Incidence = Incidence.Normal },
            Cavity = FilmGenerators.Cavity(),
        };
        var traced = new PhotonTracingModel(2_000_000, seed: 5).Solve(dark, TestContext.Current.CancellationToken).Budget;
        double lostInDots = traced.LostInLots.Sum(), absorbed = traced.SourceAbsorbedBy.Sum();
        double external = (absorbed - lostInDots) / absorbed;
        var fit = FilmYieldFit.Of(PieceOf(1), "green", Pump, external, 0.01, new DiscreteOrdinatesModel(1e-4), TestContext.Current.CancellationToken);
        Assert.Equal(factor, fit.FilmYieldFactor, 0.003);
        Assert.Equal(factor * 0.9, fit.FilmYieldShare, 0.003);
        Assert.Equal(absorbed, fit.AbsorptanceShare, 0.002);
        Assert.InRange(fit.UncertaintyFactor, 0.003, 0.03);
        Assert.True(external < fit.FilmYieldShare);
    }

    [Fact]
    public void ExternalYieldOutOfReach_IsRefusedWithTheRange() => Assert.Contains(
        "from none to a perfect yield",
        Assert.Throws<InputException>(() => FilmYieldFit.Of(PieceOf(1), "green", Pump, 1.05, 0.01, new DiscreteOrdinatesModel(), TestContext.Current.CancellationToken)).Message,
        StringComparison.Ordinal);

    [Fact]
    public void UnknownLot_IsRefusedByName() => Assert.Contains(
        "'blue'",
        Assert.Throws<InputException>(() => FilmYieldFit.Of(PieceOf(1), "blue", Pump, 0.5, 0.01, new DiscreteOrdinatesModel(), TestContext.Current.CancellationToken)).Message,
        StringComparison.Ordinal);

    // No host absorption, so that every photon ends in the dots or leaves.
    private static Film PieceOf(double factor)
    {
        var lot = FilmGenerators.Lot("green", 530, 28, 2.2, 0.9) with { FilmYieldFactor = factor };
        return FilmGenerators.Film([FilmGenerators.Layer(0.1, [new(lot, 8)], scatteringPerMm: 10)], [lot], FilmGenerators.Cavity(0.95, 0.5));
    }
}
