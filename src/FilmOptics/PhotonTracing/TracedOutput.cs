using System.Globalization;
using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>Turns counts into shares with their standard errors.</summary>
internal sealed class TracedOutput(Film film, Tally tally, long photonsAsked, ulong seed)
{
    private const double GuidedWorthAWarningShare = 1e-4;
    private readonly double _photons = tally.Photons;

    public FilmOutput Build(string model)
    {
        var shares = Enumerable.Range(0, film.Lots.Count + 1).Select(emitter => Spectra(emitter)).ToArray();
        var output = new FilmOutput
        {
            Model = model,
            Unconverted = shares[0].Light,
            ConvertedByLot = [.. shares.Skip(1).Select(pair => pair.Light)],
            Budget = Budget(),
            Warnings = [.. Warnings(tally, photonsAsked)],
        };
        return output with
        {
            Tracing = new TracingStatistics(output.Total)
            {
                Photons = tally.Photons,
                PhotonsAsked = photonsAsked,
                Seed = seed,
                Interactions = tally.Interactions,
                StandardError = StandardError(),
                UnconvertedStandardError = shares[0].Error,
                ConvertedByLotStandardError = [.. shares.Skip(1).Select(pair => pair.Error)],
            },
        };
    }

    /// <summary>Largest standard error of a line that ends photons.</summary>
    public static double LargestStandardError(Tally tally)
    {
        // The variance p (1 − p) is largest for the share nearest to one half; a converted photon is one fate here.
        long unconverted = Above(tally, 0);
        long[] fates =
        [
            unconverted, tally.Above.Sum() - unconverted, tally.LostBelow, tally.LostAbove, tally.LostInHost,
            tally.LostAtEdges, .. tally.LostInLots,
        ];
        return fates.Max(count => BinomialError(count, tally.Photons));
    }

    private static long Above(Tally tally, int emitter)
    {
        long sum = 0;
        foreach (long count in tally.Above.AsSpan(emitter * WavelengthGrid.Count, WavelengthGrid.Count))
            sum += count;
        return sum;
    }

    private static double BinomialError(double count, double photons)
    {
        double share = count / photons;
        return Math.Sqrt(share * (1 - share) / photons);
    }

    private PhotonBudget Budget() => BudgetOf(
        count => count / _photons,
        lot => tally.Excitations[lot] / _photons);

    private PhotonBudget StandardError() => BudgetOf(
        count => BinomialError(count, _photons),
        lot =>
        {
            // Excitations per photon are not 0 or 1: their spread was counted.
            double mean = tally.Excitations[lot] / _photons;
            return Math.Sqrt(Math.Max(0, (tally.SquaredExcitations[lot] / _photons) - (mean * mean)) / _photons);
        });

    private PhotonBudget BudgetOf(Func<long, double> figure, Func<int, double> excitations)
    {
        long unconverted = Above(tally, 0);
        return new()
        {
            Unconverted = figure(unconverted),
            Converted = figure(tally.Above.Sum() - unconverted),
            LostBelow = figure(tally.LostBelow),
            LostAbove = figure(tally.LostAbove),
            LostInHost = figure(tally.LostInHost),
            LostAtEdges = figure(tally.LostAtEdges),
            LostInLots = [.. tally.LostInLots.Select(figure)],
            SourceAbsorbedBy = [.. tally.SourceAbsorbedBy.Select(figure)],
            Excitations = [.. Enumerable.Range(0, film.Lots.Count).Select(excitations)],
        };
    }

    private (Spectrum<PhotonPerNm> Light, Spectrum<PhotonPerNm> Error) Spectra(int emitter)
    {
        var light = new double[WavelengthGrid.Count];
        var error = new double[WavelengthGrid.Count];
        for (int bin = 0; bin < light.Length; bin++)
        {
            long count = tally.Above[(emitter * WavelengthGrid.Count) + bin];
            (light[bin], error[bin]) = (count / _photons, BinomialError(count, _photons));
        }

        string name = emitter == 0 ? "source" : film.Lots[emitter - 1].Name;
        return (
            Spectrum.FromSamples<PhotonPerNm>(light, $"{name}, traced"),
            Spectrum.FromSamples<PhotonPerNm>(error, $"{name}, standard error of the traced light"));
    }

    /// <summary>What makes a traced result doubtful.</summary>
    public static IEnumerable<string> Warnings(Tally tally, long photonsAsked)
    {
        if (tally.Photons < photonsAsked)
        {
            yield return string.Create(
                CultureInfo.InvariantCulture,
                $"Interrupted: {tally.Photons:N0} of {photonsAsked:N0} photons were traced. Standard errors are those of the traced ones.");
        }

        double guided = (double)tally.LostAtEdges / tally.Photons;
        if (guided > GuidedWorthAWarningShare)
        {
            yield return string.Create(
                CultureInfo.InvariantCulture,
                $"{100 * guided:0.##} % of the source photons are guided to the edges, because nothing in the film ends them sooner. Any real film scatters a little: give scattering_per_mm a value above 0.");
        }
    }
}
