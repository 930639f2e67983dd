using Colorimetry;

namespace FilmOptics;

/// <summary>The quick model: Beer–Lambert absorption in one well-mixed layer, with every generation of re-absorption.</summary>
/// <remarks>
/// <para>It sees no scattering, no faces and no angles beyond a mean path; its warnings name the keys it did not use.</para>
/// <para>
/// The light below and above bounces between the outer reflectors in closed form, and J = (I − PΦ)⁻¹ J⁰ sums all generations: the
/// closed form of the series of Weber and Lambe 1976 (Appl. Opt. 15, 2299) and Batchelder et al. 1979 (Appl. Opt. 18, 3090), from memory.
/// </para>
/// </remarks>
public sealed class BeerLambertModel : IFilmModel
{
    /// <summary>Largest gap that the photon budget may have.</summary>
    public const double BudgetToleranceShare = 1e-12;

    /// <inheritdoc/>
    public string Name => "beer-lambert";

    /// <inheritdoc/>
    public FilmOutput Solve(Film film, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        cancellationToken.ThrowIfCancellationRequested();
        var (depths, hostDepth) = MixedLayer.Of(film);
        var paths = BeerLambertPathLengths.Of(film);
        double? flatReturn = film.Cavity.AboveReflectanceByAngle?.LambertianMean;
        int lots = film.Lots.Count;
        var source = film.Backlight.Photons.Samples;
        double bypass = film.Cavity.BypassShare;

        var unconverted = new double[WavelengthGrid.Count];
        var emittedOut = new double[WavelengthGrid.Count];
        var sourceAbsorbed = new double[lots];
        // Per emitting lot j: shares of one emitted photon. reabsorbed[i, j] is P of physics: absorbed by i, emitted by j.
        var reabsorbed = new double[lots, lots];
        var emittedBelow = new double[lots];
        var emittedAbove = new double[lots];
        var emittedInHost = new double[lots];
        double lostBelow = 0, lostAbove = 0, lostInHost = 0;

        for (int w = 0; w < WavelengthGrid.Count; w++)
        {
            double dots = 0, emission = 0;
            for (int i = 0; i < lots; i++)
            {
                dots += depths[i][w];
                emission += film.Lots[i].Emission.Samples[w];
            }

            if (source[w] == 0 && emission == 0)
                continue;
            double depth = dots + hostDepth[w];
            double below = film.Cavity.BelowReflectance.Samples[w];
            double above = flatReturn ?? film.Cavity.AboveReflectance.Samples[w];
            double aboveLoss = film.Cavity.AboveAbsorptance.Samples[w];
            var pump = CavityPass.Outside(depth * paths.PumpFactor, below, above, aboveLoss, w);
            var light = CavityPass.Inside(depth * paths.EmissionFactor, below, above, aboveLoss, w);
            emittedOut[w] = light.Out;

            double up = source[w] * (1 - bypass), missed = source[w] * bypass, down = missed * above;
            unconverted[w] = (up * pump.FromBelow.Out) + (down * pump.FromAbove.Out) + (missed * (1 - above - aboveLoss));
            lostBelow += (up * pump.FromBelow.LostBelow) + (down * pump.FromAbove.LostBelow);
            lostAbove += (up * pump.FromBelow.LostAbove) + (down * pump.FromAbove.LostAbove) + (missed * aboveLoss);
            double absorbed = (up * pump.FromBelow.Absorbed) + (down * pump.FromAbove.Absorbed);
            double hostShare = depth > 0 ? hostDepth[w] / depth : 0;
            lostInHost += absorbed * hostShare;
            for (int i = 0; i < lots; i++)
            {
                double share = depth > 0 ? depths[i][w] / depth : 0;
                sourceAbsorbed[i] += absorbed * share;
                for (int j = 0; j < lots; j++)
                    reabsorbed[i, j] += film.Lots[j].Emission.Samples[w] * light.Absorbed * share;
                double emitted = film.Lots[i].Emission.Samples[w];
                emittedBelow[i] += emitted * light.LostBelow;
                emittedAbove[i] += emitted * light.LostAbove;
                emittedInHost[i] += emitted * light.Absorbed * hostShare;
            }
        }

        var excitations = Cascade.Solve(reabsorbed, [.. film.Lots.Select(lot => lot.FilmYieldShare)], sourceAbsorbed);
        var converted = new Spectrum<PhotonPerNm>[lots];
        var lostInLots = new double[lots];
        double convertedPhotons = 0;
        for (int j = 0; j < lots; j++)
        {
            double photons = film.Lots[j].FilmYieldShare * excitations[j];
            lostInLots[j] = (1 - film.Lots[j].FilmYieldShare) * excitations[j];
            lostBelow += photons * emittedBelow[j];
            lostAbove += photons * emittedAbove[j];
            lostInHost += photons * emittedInHost[j];
            var spectrum = new double[WavelengthGrid.Count];
            var emission = film.Lots[j].Emission.Samples;
            for (int w = 0; w < spectrum.Length; w++)
                spectrum[w] = photons * emission[w] * emittedOut[w];
            converted[j] = Spectrum.FromSamples<PhotonPerNm>(spectrum, $"{film.Lots[j].Name} ({Name})");
            convertedPhotons += converted[j].Integral;
        }

        return new FilmOutput
        {
            Model = Name,
            Unconverted = Spectrum.FromSamples<PhotonPerNm>(unconverted, $"unconverted ({Name})"),
            ConvertedByLot = converted,
            Budget = new PhotonBudget
            {
                Unconverted = unconverted.Sum(),
                Converted = convertedPhotons,
                LostBelow = lostBelow,
                LostAbove = lostAbove,
                LostInHost = lostInHost,
                LostAtEdges = 0, // One mixed layer without faces guides nothing.
                LostInLots = lostInLots,
                SourceAbsorbedBy = sourceAbsorbed,
                Excitations = excitations,
            }.RequireClosed(BudgetToleranceShare * Math.Max(1, excitations.Sum())),
            Warnings = BeerLambertWarnings.For(film),
        };
    }
}
