using System.Globalization;
using Colorimetry;
using FilmOptics.BeerLambert;

namespace FilmOptics;

/// <summary>The quick model: Beer–Lambert absorption in one well-mixed layer, with cavity returns and every generation of re-emission.</summary>
/// <remarks>
/// <para>Sees no scattering, faces, angles or edges; a warning names the keys of the film file that it did not use. Several layers are mixed
/// into one, each with its own thickness and path.</para>
/// <para>The cascade is summed in closed form, J = (I − PΦ)⁻¹ J⁰: the generation series of Weber and Lambe 1976 (Applied Optics 15, 2299) and
/// Batchelder et al. 1979 (Applied Optics 18, 3090), cited from memory. Each line of the budget comes from its own flux or absorption.</para>
/// </remarks>
public sealed class BeerLambertModel : IFilmModel
{
    /// <summary>Largest gap that the photon budget may have.</summary>
    public const double BudgetToleranceShare = 1e-12;

    /// <inheritdoc/>
    public string Name => "beer-lambert";

    /// <summary>Finds where each source photon goes, in some tens of microseconds.</summary>
    /// <param name="film">The film.</param>
    /// <param name="cancellationToken">Heeded before the solve, which is short.</param>
    /// <exception cref="InputException">A number is out of its range, or light is caught between perfect mirrors with nothing to end it.</exception>
    /// <exception cref="NumericalFailureException">The budget does not close within 1e-12, or a figure is not a number.</exception>
    public FilmOutput Solve(Film film, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        cancellationToken.ThrowIfCancellationRequested();
        CheckedFilm.Require(film);

        double? returnMean = film.Cavity.AboveReflectanceByAngle?.LambertianMean;
        var above = returnMean is { } mean
            ? Spectrum.Flat<Fraction>(mean, "mean return above").Samples
            : film.Cavity.AboveReflectance.Samples;

        var unconverted = new double[WavelengthGrid.Count];
        var first = new double[film.Lots.Count];
        var source = FollowSource(film, above, unconverted, first);

        var emission = new LotEmission[film.Lots.Count];
        var again = new double[film.Lots.Count * film.Lots.Count];
        FollowEmission(film, above, emission, again);

        double[] excitations = [.. first];
        if (!Cascade.Sum(again, [.. emission.Select(e => e.EndedShare)], excitations))
        {
            throw new InputException(new InputFault("cavity", null, null,
                "emitted light is caught for ever: the returns leave no way out, and yields of 1 and a clear host no end. Lower a return or a yield."));
        }

        return new()
        {
            Model = Name,
            Unconverted = Spectrum.FromSamples<PhotonPerNm>(unconverted, "source light above, beer-lambert"),
            ConvertedByLot = [.. emission.Select((e, i) => e.LightAbove(excitations[i], film.Lots[i].Name))],
            Budget = new PhotonBudget
            {
                Unconverted = source.Out,
                Converted = Emitted(e => e.Out),
                LostBelow = source.LostBelow + Emitted(e => e.LostBelow),
                LostAbove = source.LostAbove + Emitted(e => e.LostAbove),
                LostInHost = source.LostInHost + Emitted(e => e.LostInHost),
                LostAtEdges = 0,
                LostInLots = [.. film.Lots.Select((lot, i) => (1 - lot.FilmYieldShare) * excitations[i])],
                SourceAbsorbedBy = first,
                Excitations = excitations,
            }.RequireClosed(BudgetToleranceShare),
            Warnings = UnusedKeys.Warnings(film, returnMean),
        };

        double Emitted(Func<LightEnds, double> line)
        {
            double sum = 0;
            for (int i = 0; i < emission.Length; i++)
                sum += emission[i].YieldShare * excitations[i] * line(emission[i].Ends);
            return sum;
        }
    }

    private static LightEnds FollowSource(Film film, ReadOnlySpan<double> above, Span<double> unconverted, Span<double> absorbed)
    {
        Span<double> weights = new double[film.Lots.Count];
        Span<double> room = stackalloc double[(2 * WavelengthGrid.Count) + CavityFates.Room];
        var layer = new MixedLayer(film, PathsOf(film, film.BeerLambertPaths?.PumpPathFactor, n => PathFactors.OfSource(film.Backlight.Incidence, n)), weights, room);
        var fates = new CavityFates(room[(2 * WavelengthGrid.Count)..]);
        ReadOnlySpan<double> light = film.Backlight.Photons.Samples;
        if (fates.OfSource(layer.Depth, film.Cavity.BelowReflectance.Samples, above, film.Cavity.AboveAbsorptance.Samples, film.Cavity.BypassShare))
            RequireAnEnd(film, above, layer.Depth, light, "source light");
        for (int i = 0; i < unconverted.Length; i++)
            unconverted[i] = light[i] * fates.Out[i];
        for (int i = 0; i < absorbed.Length; i++)
            absorbed[i] = weights[i] * SpectralSum.Of(light, film.Lots[i].Absorbance.Samples, fates.AbsorbedPerDepth);
        return LightEnds.Of(light, fates, layer.HostDepth);
    }

    private static void FollowEmission(Film film, ReadOnlySpan<double> above, Span<LotEmission> emission, Span<double> again)
    {
        int count = film.Lots.Count;
        Span<double> weights = new double[count];
        Span<double> room = stackalloc double[(2 * WavelengthGrid.Count) + CavityFates.Room];
        var layer = new MixedLayer(film, PathsOf(film, film.BeerLambertPaths?.EmissionPathFactor, PathFactors.Lambertian), weights, room);
        var fates = new CavityFates(room[(2 * WavelengthGrid.Count)..]);
        bool caught = fates.OfEmission(layer.Depth, film.Cavity.BelowReflectance.Samples, above, film.Cavity.AboveAbsorptance.Samples);
        for (int j = 0; j < count; j++)
        {
            var lot = film.Lots[j];
            double yieldShare = lot.FilmYieldShare;
            if (weights[j] == 0 || yieldShare == 0)
            {
                emission[j] = LotEmission.None;
                continue;
            }

            ReadOnlySpan<double> light = lot.Emission.Samples;
            if (caught)
                RequireAnEnd(film, above, layer.Depth, light, $"light of {lot.Name}");
            emission[j] = LotEmission.Of(light, fates, layer.HostDepth, yieldShare);
            double sum = emission[j].Ends.Sum;
            for (int i = 0; i < count; i++)
            {
                double absorbed = weights[i] * SpectralSum.Of(light, film.Lots[i].Absorbance.Samples, fates.AbsorbedPerDepth);
                again[(i * count) + j] = yieldShare * absorbed;
                sum += absorbed;
            }

            // The cascade closes by its construction, so that what goes into it is tested here.
            if (!(Math.Abs(1 - sum) <= BudgetToleranceShare))
            {
                throw new NumericalFailureException(string.Create(
                    CultureInfo.InvariantCulture, $"The fates of light of {lot.Name} sum to {sum:R}; they have to sum to 1 within {BudgetToleranceShare:g1}."));
            }
        }
    }

    private static double[] PathsOf(Film film, double? given, Func<double, double> byIndex) =>
        [.. film.Layers.Select(layer => given ?? byIndex(layer.RefractiveIndex))];

    private static void RequireAnEnd(Film film, ReadOnlySpan<double> above, ReadOnlySpan<double> depth, ReadOnlySpan<double> light, string which)
    {
        for (int i = 0; i < light.Length; i++)
        {
            if (light[i] > 0 && depth[i] == 0 && above[i] == 1 && film.Cavity.BelowReflectance.Samples[i] == 1)
            {
                throw new InputException(new InputFault("cavity", null, null, string.Create(
                    CultureInfo.InvariantCulture,
                    $"at {WavelengthGrid.NmAt(i)} nm below_reflectance and above_reflectance are both 1 and the film absorbs nothing: {which} can never leave. Lower one of them.")));
            }
        }
    }
}
