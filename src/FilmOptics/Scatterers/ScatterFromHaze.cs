using System.Globalization;
using Colorimetry;

namespace FilmOptics;

/// <summary>Scattering coefficient and anisotropy that explain a measured total transmittance and haze.</summary>
/// <param name="ScatteringPerMm">s, 1/mm.</param>
/// <param name="MeanCosine">g of the Henyey–Greenstein function.</param>
/// <param name="ScatteringErrorPerMm">Standard error of s from the uncertainty of the readings.</param>
/// <param name="MeanCosineError">Standard error of g from the same.</param>
/// <param name="Reading">What a meter would read on the coat that was found.</param>
/// <param name="Warnings">What makes the result doubtful.</param>
public sealed record ScatterEstimate(
    double ScatteringPerMm,
    double MeanCosine,
    double ScatteringErrorPerMm,
    double MeanCosineError,
    HazeReading Reading,
    IReadOnlyList<string> Warnings);

/// <summary>The way back from a haze meter: s and g are never measured, transmittance and haze are.</summary>
/// <remarks>
/// A coarse map of readings over s and g gives the start, Newton steps with slopes by central differences do the rest, and the last
/// steps, on many photons, are averaged.
/// </remarks>
public static class ScatterFromHaze
{
    private const string Name = "scatter-from-haze";
    private const long MapPhotons = 16_384, SlopePhotons = 131_072;
    private const double DoubtfulCosineError = 0.1, SlopeStep = 0.2, LargestStep = 0.7;
    private const int WavelengthNm = 550;

    // Optical thickness and g outside these cannot be told from their neighbours by a haze meter.
    private static readonly (double Least, double Most) LogThickness = (Math.Log(1e-3), Math.Log(200));
    private static readonly (double Least, double Most) LogSideways = (Math.Log(1e-3), Math.Log(1.9));

    /// <summary>Finds s and g.</summary>
    /// <param name="measurement">What was measured on what.</param>
    /// <param name="photons">Photons for each of the last steps, at least 1.</param>
    /// <param name="seed">Any number.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="InputException">A figure is out of range, or no scattering explains the readings.</exception>
    public static ScatterEstimate Solve(
        HazeMeasurement measurement, long photons = 2_000_000, ulong seed = 1, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        measurement.Check(Name);
        var search = new Search(measurement, photons, seed, cancellationToken);
        Fit? best = null;
        foreach (Point start in search.Starts())
        {
            var fit = search.From(start);
            if (best is null || fit.Miss < best.Miss)
                best = fit;
            if (best.Miss <= search.Tolerance)
                return search.Estimate(best);
        }

        throw search.Refusal(best!);
    }

    /// <summary>Logarithms of s·d and of 1 − g: the readings are nearly linear in them.</summary>
    private readonly record struct Point(double LogThickness, double LogSideways)
    {
        public double Cosine => 1 - Math.Exp(LogSideways);

        public Point Moved(double thickness, double sideways) => new(
            Math.Clamp(LogThickness + thickness, ScatterFromHaze.LogThickness.Least, ScatterFromHaze.LogThickness.Most),
            Math.Clamp(LogSideways + sideways, ScatterFromHaze.LogSideways.Least, ScatterFromHaze.LogSideways.Most));
    }

    /// <summary>How readings change with the point: rows transmittance and haze, columns thickness and sideways.</summary>
    private readonly record struct Slopes(double Tt, double Ts, double Ht, double Hs)
    {
        private double Determinant => (Tt * Hs) - (Ts * Ht);

        public bool IsUsable => Math.Abs(Determinant) > 1e-9;

        public (double Thickness, double Sideways) Solve(double transmittance, double haze) => (
            ((Hs * transmittance) - (Ts * haze)) / Determinant, ((Tt * haze) - (Ht * transmittance)) / Determinant);
    }

    private sealed record Fit(Point Point, HazeReading Reading, Slopes Slopes, double Miss);

    private sealed class Search(HazeMeasurement measured, long photons, ulong seed, CancellationToken cancellationToken)
    {
        private ulong _draws = seed;

        /// <summary>How near both readings have to be met: chance in the tracing, and a hundredth of a percentage point.</summary>
        public double Tolerance => 1e-4 + (4 / Math.Sqrt(photons));

        /// <summary>The three best nodes of the map.</summary>
        public IEnumerable<Point> Starts()
        {
            double[] cosines = [-0.5, 0, 0.3, 0.5, 0.7, 0.8, 0.9, 0.95, 0.98, 0.995];
            double[] thicknesses = [0.01, 0.03, 0.1, 0.3, 0.7, 1.5, 3, 7, 15, 40];
            return (from cosine in cosines
                    from thickness in thicknesses
                    let point = new Point(Math.Log(thickness), Math.Log(1 - cosine))
                    orderby MissOf(Read(point, MapPhotons))
                    select point).Take(3);
        }

        public Fit From(Point point)
        {
            var slopes = default(Slopes);
            for (int i = 0; i < 5; i++)
            {
                slopes = SlopesAt(point);
                if (!slopes.IsUsable)
                    return new(point, Read(point, photons), slopes, double.MaxValue);
                point = Step(point, Read(point, SlopePhotons), slopes);
            }

            // The slopes stay; what is left is chance, which averages out.
            point = Step(point, Read(point, photons), slopes);
            const int steps = 4;
            double thickness = 0, sideways = 0;
            for (int i = 0; i < steps; i++)
            {
                var next = Step(point, Read(point, photons), slopes);
                thickness += next.LogThickness / steps;
                sideways += next.LogSideways / steps;
            }

            var found = new Point(thickness, sideways);
            var reading = Read(found, photons);
            return new(found, reading, slopes, MissOf(reading));
        }

        public ScatterEstimate Estimate(Fit fit)
        {
            double scattering = Math.Exp(fit.Point.LogThickness) / measured.ThicknessMm;
            (double thicknessT, double sidewaysT) = fit.Slopes.Solve(measured.UncertaintyShare, 0);
            (double thicknessH, double sidewaysH) = fit.Slopes.Solve(0, measured.UncertaintyShare);
            double cosineError = (1 - fit.Point.Cosine) * double.Hypot(sidewaysT, sidewaysH);
            string[] warnings = cosineError <= DoubtfulCosineError ? [] :
            [
                string.Create(CultureInfo.InvariantCulture,
                    $"These readings hardly tell s from g: half of the uncertainty given moves g by {cosineError / 2:0.##}. Measure a coat of another thickness."),
            ];
            return new(
                scattering, fit.Point.Cosine, scattering * double.Hypot(thicknessT, thicknessH), cosineError, fit.Reading, warnings);
        }

        public InputException Refusal(Fit nearest) => new(new InputFault(Name, null, null, string.Create(
            CultureInfo.InvariantCulture,
            $"no scattering explains a total transmittance of {100 * measured.TotalTransmittanceShare:0.##} % with a haze of {100 * measured.HazeShare:0.##} %; the nearest is {100 * nearest.Reading.TotalTransmittanceShare:0.##} % with {100 * nearest.Reading.HazeShare:0.##} %. {(nearest.Reading.TotalTransmittanceShare > measured.TotalTransmittanceShare ? "The coat may absorb: give its absorption." : "Check index, thickness and readings.")}")));

        private static double Limited(double step) => Math.Clamp(step, -LargestStep, LargestStep);

        private double MissOf(HazeReading reading) => Math.Max(
            Math.Abs(reading.TotalTransmittanceShare - measured.TotalTransmittanceShare),
            Math.Abs(reading.HazeShare - measured.HazeShare));

        private Point Step(Point point, HazeReading reading, Slopes slopes)
        {
            (double thickness, double sideways) = slopes.Solve(
                measured.TotalTransmittanceShare - reading.TotalTransmittanceShare, measured.HazeShare - reading.HazeShare);
            return point.Moved(Limited(thickness), Limited(sideways));
        }

        private Slopes SlopesAt(Point point)
        {
            var (lower, upper) = (point.Moved(-SlopeStep, 0), point.Moved(SlopeStep, 0));
            var (forward, sideways) = (point.Moved(0, -SlopeStep), point.Moved(0, SlopeStep));
            (double tt, double ht) = Slope(Read(lower, SlopePhotons), Read(upper, SlopePhotons), upper.LogThickness - lower.LogThickness);
            (double ts, double hs) = Slope(
                Read(forward, SlopePhotons), Read(sideways, SlopePhotons), sideways.LogSideways - forward.LogSideways);
            return new(tt, ts, ht, hs);
        }

        private static (double Transmittance, double Haze) Slope(HazeReading from, HazeReading to, double step) => (
            (to.TotalTransmittanceShare - from.TotalTransmittanceShare) / step, (to.HazeShare - from.HazeShare) / step);

        private HazeReading Read(Point point, long count)
        {
            var coat = Coat(measured, Math.Exp(point.LogThickness) / measured.ThicknessMm, point.Cosine);
            return new TracedHazeMeter(count, _draws++).Read(coat, WavelengthNm, cancellationToken);
        }
    }

    /// <summary>A single layer of the measured coat with given scattering.</summary>
    internal static Film Coat(HazeMeasurement coat, double scatteringPerMm, double meanCosine)
    {
        var none = Spectrum.Flat<Fraction>(0, Name);
        return new()
        {
            Title = Name,
            Backlight = new(Spectrum.Flat<PhotonPerNm>(1.0 / WavelengthGrid.Count, Name), Incidence.Normal, null),
            Cavity = new(none, none, none, 0),
            Lots = [],
            Layers =
            [
                new()
                {
                    Name = "coat",
                    ThicknessMm = coat.ThicknessMm,
                    RefractiveIndex = coat.RefractiveIndex,
                    HostAbsorption = Spectrum.Flat<PerMm>(coat.AbsorptionPerMm, Name),
                    Scattering = Spectrum.Flat<PerMm>(scatteringPerMm, Name),
                    Anisotropy = Spectrum.Flat<MeanCosine>(meanCosine, Name),
                    Dots = [],
                },
            ],
        };
    }
}
