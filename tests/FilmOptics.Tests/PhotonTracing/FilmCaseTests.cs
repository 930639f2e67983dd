using Colorimetry;

namespace FilmOptics.Tests.PhotonTracing;

/// <summary>Whole films with re-emission against independent codes.</summary>
public sealed class FilmCaseTests
{
    private const long Photons = 1_000_000;

    private static readonly Dictionary<string, Lazy<FilmOutput>> Traced = new(StringComparer.Ordinal)
    {
        ["a"] = new(() => new PhotonTracingModel(Photons, seed: 11).Solve(ReferenceFilms.CaseA, TestContext.Current.CancellationToken)),
        ["c"] = new(() => new PhotonTracingModel(Photons, seed: 12).Solve(ReferenceFilms.CaseC, TestContext.Current.CancellationToken)),
        ["d"] = new(() => new PhotonTracingModel(Photons, seed: 13).Solve(ReferenceFilms.CaseD, TestContext.Current.CancellationToken)),
    };

    [Theory]
    [InlineData("a")]
    [InlineData("c")]
    [InlineData("d")]
    public void Totals_OfAnalogTracingElsewhere_AreMetWithinFourErrors(string name)
    {
        var output = Traced[name].Value;
        var (budget, error) = (output.Budget, output.Tracing!.StandardError);
        int rows = 0;
        foreach (string[] row in ReferenceRows.Of("film-case-totals.csv").Where(row => row[0] == name))
        {
            (double found, double foundError) = row[1] switch
            {
                "unconverted" => (budget.Unconverted, error.Unconverted),
                "converted green" => Band(output, 0),
                "converted red" => Band(output, 1),
                "lost in green" => (budget.LostInLots[0], error.LostInLots[0]),
                "lost in red" => (budget.LostInLots[1], error.LostInLots[1]),
                "lost in host" => (budget.LostInHost, error.LostInHost),
                "lost below" => (budget.LostBelow, error.LostBelow),
                "lost above" => (budget.LostAbove, error.LostAbove),
                "source absorbed green" => (budget.SourceAbsorbedBy[0], error.SourceAbsorbedBy[0]),
                "source absorbed red" => (budget.SourceAbsorbedBy[1], error.SourceAbsorbedBy[1]),
                "excitations green" => (budget.Excitations[0], error.Excitations[0]),
                "excitations red" => (budget.Excitations[1], error.Excitations[1]),
                _ => throw new InvalidDataException(row[1]),
            };
            Agreement.AssertWithin(
                ReferenceRows.Number(row[2]), ReferenceRows.Number(row[3]), found, foundError, $"case {name}, {row[1]}");
            rows++;
        }

        Assert.Equal(12, rows);
    }

    [Theory]
    [InlineData("a")]
    [InlineData("c")]
    [InlineData("d")]
    public void Spectra_OfAnalogTracingElsewhere_AreMetBinByBin(string name)
    {
        const double referencePhotons = 1e8;
        var output = Traced[name].Value;
        double chiSquared = 0;
        int bins = 0;
        foreach (string[] row in ReferenceRows.Of("film-case-spectra.csv").Where(row => row[0] == name))
        {
            int bin = WavelengthGrid.IndexOf(int.Parse(row[1], System.Globalization.CultureInfo.InvariantCulture));
            double[] found =
            [
                output.Unconverted.Samples[bin],
                output.ConvertedByLot[0].Samples[bin],
                output.ConvertedByLot[1].Samples[bin],
            ];
            for (int emitter = 0; emitter < found.Length; emitter++)
            {
                // Counts of rare events: the variance is that of their common mean.
                double expected = ReferenceRows.Number(row[2 + emitter]);
                double common = ((found[emitter] * Photons) + (expected * referencePhotons)) / (Photons + referencePhotons);
                if (common * Photons < 20)
                    continue;
                chiSquared += Math.Pow(found[emitter] - expected, 2) / (common * ((1.0 / Photons) + (1 / referencePhotons)));
                bins++;
            }
        }

        Assert.True(bins > 40, $"{bins} bins");
        Agreement.AssertChiSquared(chiSquared, bins, $"case {name}");
    }

    // Source: computed by an independent deterministic code, uncertainty about 3e-6.
    [Fact]
    public void UnequalIndices_MeetAnIndependentSolution() => AssertLayered(
        ReferenceFilms.Unequal,
        [0.18413255953877716, 0.5957587114019374, 0.045187650063262155, 0.04253952386949354, 0.03476912405797798],
        [0.584759748368138, 0.5684258742395517],
        [0.19909284496110546, 0.39666586644083196]);

    // Source: as above.
    [Fact]
    public void AirGapProfileAndReturnByAngle_MeetAnIndependentSolution() => AssertLayered(
        ReferenceFilms.Gap,
        [0.2276384180119615, 0.5834125597124075, 0.05526576724695719, 0.02239397189355825, 0.029514497531574865],
        [0.4445629868860678, 0.5009182399115543],
        [0.23529816423473965, 0.3481143954776678]);

    private static void AssertLayered(Film film, double[] lines, double[] excitations, double[] bands)
    {
        const double referenceError = 3e-6;
        var output = new PhotonTracingModel(1_000_000, seed: 21).Solve(film, TestContext.Current.CancellationToken);
        var (budget, error) = (output.Budget, output.Tracing!.StandardError);
        double[] found = [budget.Unconverted, budget.Converted, budget.LostBelow, budget.LostAbove, budget.LostInHost];
        double[] errors = [error.Unconverted, error.Converted, error.LostBelow, error.LostAbove, error.LostInHost];
        for (int i = 0; i < lines.Length; i++)
            Agreement.AssertWithin(lines[i], referenceError, found[i], errors[i], $"{film.Title}, line {i}");
        for (int lot = 0; lot < excitations.Length; lot++)
        {
            Agreement.AssertWithin(
                excitations[lot], referenceError, budget.Excitations[lot], error.Excitations[lot], $"{film.Title}, excitations {lot}");
            (double band, double bandError) = Band(output, lot);
            Agreement.AssertWithin(bands[lot], referenceError, band, bandError, $"{film.Title}, band {lot}");
        }
    }

    private static (double Share, double Error) Band(FilmOutput output, int lot)
    {
        double share = output.ConvertedByLot[lot].Integral;
        return (share, Math.Sqrt(share * (1 - share) / output.Tracing!.Photons));
    }
}
