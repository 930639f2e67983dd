using Colorimetry;
using FilmOptics.Tests.PhotonTracing;

namespace FilmOptics.Tests.Scatterers;

public sealed class HazeTests
{
    private static readonly TracedHazeMeter Meter = new(400_000, seed: 41);

    [Theory]
    [InlineData(0.5)]
    [InlineData(0.9)]
    [InlineData(0.99)]
    public void ThinCoatWithoutFaces_HasTheHazeOfSingleScattering(double g)
    {
        // Closed form: of light scattered once, the Henyey–Greenstein function puts F within angle θ of the beam,
        // F = (1 − g²)/(2g) · (1/(1 − g) − 1/√(1 + g² − 2g cos θ)); scattered twice is (s d)² ≈ 4e-4 at most.
        const double thickness = 0.02;
        double cosine = Math.Cos(2.5 * Math.PI / 180);
        double Within(double c) => (1 - (g * g)) / (2 * g) * ((1 / (1 - g)) - (1 / Math.Sqrt(1 + (g * g) - (2 * g * c))));
        double scattered = 1 - Math.Exp(-thickness);
        double forward = Within(0), narrow = Within(cosine);
        var reading = Meter.Read(
            ReferenceFilms.Slab(1, thickness, 1, g, Incidence.Normal), 550, TestContext.Current.CancellationToken);
        const double secondOrder = thickness * thickness;
        Agreement.AssertWithin(
            1 - (scattered * (1 - forward)), secondOrder / 4, reading.TotalTransmittanceShare, reading.TotalTransmittanceErrorShare, "transmittance");
        Agreement.AssertWithin(
            scattered * (forward - narrow) / (1 - (scattered * (1 - forward))), secondOrder / 4, reading.HazeShare, reading.HazeErrorShare, "haze");
    }

    [Fact]
    public void ClearFilm_HasNoHaze()
    {
        var reading = Meter.Read(ReferenceFilms.Slab(1.5, 1e-9, 1, 0, Incidence.Normal), 550, TestContext.Current.CancellationToken);
        Assert.Equal(0, reading.HazeShare);
        Agreement.AssertWithin(0.96 / 1.04, 1e-9, reading.TotalTransmittanceShare, reading.TotalTransmittanceErrorShare, "transmittance");
    }

    [Fact]
    public void BacklightAndSheets_DoNotChangeTheReading()
    {
        var film = ReferenceFilms.CaseD;
        var bare = film with
        {
            Cavity = film.Cavity with { BelowReflectance = ReferenceFilms.Flat<Fraction>(0), BypassShare = 0.5 },
            Backlight = film.Backlight with { Incidence = Incidence.Normal },
        };
        Assert.Equal(
            Meter.Read(film, 750, TestContext.Current.CancellationToken), Meter.Read(bare, 750, TestContext.Current.CancellationToken));
    }

    [Theory]
    [InlineData(450, "dots absorb")]
    [InlineData(900, "900 nm")]
    public void Wavelength_WhereNoHazeCanBeRead_IsRefusedByName(int wavelengthNm, string part)
    {
        var refusal = Assert.Throws<InputException>(() =>
            Meter.Read(ReferenceFilms.CaseC, wavelengthNm, TestContext.Current.CancellationToken));
        Assert.Contains(part, refusal.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(12, 0.8)]
    [InlineData(20, 0.9)]
    [InlineData(3, 0.5)]
    public void ScatterFromHaze_OfAComputedReading_FindsThatScattering(double scatteringPerMm, double g)
    {
        var coat = new HazeMeasurement { TotalTransmittanceShare = 0.5, HazeShare = 0.5, ThicknessMm = 0.1, RefractiveIndex = 1.5 };
        var reading = new TracedHazeMeter(2_000_000, seed: 42).Read(
            ScatterFromHaze.Coat(coat, scatteringPerMm, g), 550, TestContext.Current.CancellationToken);
        var found = ScatterFromHaze.Solve(
            coat with
            {
                TotalTransmittanceShare = reading.TotalTransmittanceShare,
                HazeShare = reading.HazeShare,
                UncertaintyShare = reading.TotalTransmittanceErrorShare + reading.HazeErrorShare,
            },
            photons: 500_000,
            seed: 43,
            TestContext.Current.CancellationToken);
        Agreement.AssertWithin(scatteringPerMm, 0, found.ScatteringPerMm, found.ScatteringErrorPerMm, "scattering per mm");
        Agreement.AssertWithin(g, 0, found.MeanCosine, found.MeanCosineError, "g");
        Assert.Equal(reading.HazeShare, found.Reading.HazeShare, 6e-3);
        Assert.Equal(reading.TotalTransmittanceShare, found.Reading.TotalTransmittanceShare, 6e-3);
        Assert.Empty(found.Warnings);
    }

    [Theory]
    [InlineData(0.95, 0.5, "a clear coat of index 1.5")]
    [InlineData(0.5, 0.05, "The coat may absorb")]
    [InlineData(0.9, 0, "Without haze")]
    [InlineData(double.NaN, 0.5, "a total transmittance of NaN")]
    public void ScatterFromHaze_OfReadingsThatNothingExplains_IsRefusedWithTheReason(
        double transmittance, double haze, string part)
    {
        var coat = new HazeMeasurement
        {
            TotalTransmittanceShare = transmittance,
            HazeShare = haze,
            ThicknessMm = 0.1,
            RefractiveIndex = 1.5,
        };
        var refusal = Assert.Throws<InputException>(() =>
            ScatterFromHaze.Solve(coat, photons: 100_000, seed: 44, TestContext.Current.CancellationToken));
        Assert.Contains(part, refusal.Message, StringComparison.Ordinal);
    }
}
