using Colorimetry;

namespace FilmOptics;

/// <summary>One homogeneous layer of the film.</summary>
public sealed record Layer
{
    /// <summary>Name, unique in the film.</summary>
    public required string Name { get; init; }

    /// <summary>Cured thickness, mm, above 0.</summary>
    public required double ThicknessMm { get; init; }

    /// <summary>Refractive index, 1 to 3, the same at all wavelengths. 1 is an air gap.</summary>
    public required double RefractiveIndex { get; init; }

    /// <summary>Absorption of the host alone, 1/mm, base e.</summary>
    public required Spectrum<PerMm> HostAbsorption { get; init; }

    /// <summary>Scattering coefficient, 1/mm, of host and dots together.</summary>
    public required Spectrum<PerMm> Scattering { get; init; }

    /// <summary>Henyey–Greenstein anisotropy g, between −1 and 1.</summary>
    public required Spectrum<MeanCosine> Anisotropy { get; init; }

    /// <summary>The dots in the layer; may be empty. A lot stands in a layer once.</summary>
    public required IReadOnlyList<DotLoading> Dots { get; init; }

    /// <summary>Density of the cured host, g/mL; null where unknown. Mass loadings and coat weights need it.</summary>
    public double? HostDensityGPerMl { get; init; }

    /// <summary>The same layer with other dots: what the old ones scattered goes, what the new ones scatter comes.</summary>
    /// <param name="dots">The dots; a lot once.</param>
    public Layer WithDots(IReadOnlyList<DotLoading> dots)
    {
        double changePerMm = dots.Sum(dot => dot.ScatteringPerMm) - Dots.Sum(dot => dot.ScatteringPerMm);
        return this with
        {
            Dots = dots,

            // The same spectrum where nothing changes: models share their tables by it. Rounding must not leave less than nothing.
            Scattering = changePerMm == 0 ? Scattering
                : Spectrum.FromSamples<PerMm>([.. Scattering.Samples.ToArray().Select(perMm => Math.Max(0, perMm + changePerMm))], Scattering.Source),
        };
    }
}

/// <summary>A lot in a layer.</summary>
/// <param name="Lot">Which lot.</param>
/// <param name="LoadingMgPerMl">Dots with their ligand per volume of cured layer, mg/mL, at least 0.</param>
public sealed record DotLoading(DotLot Lot, double LoadingMgPerMl)
{
    /// <summary>Absorption coefficient of these dots in the film: k = ln 10 · A₁ · factor · c / 10, in 1/mm.</summary>
    /// <param name="wavelengthIndex">Index on <see cref="WavelengthGrid"/>.</param>
    public double AbsorptionPerMm(int wavelengthIndex) =>
        Lot.Absorbance.Samples[wavelengthIndex] * AbsorptionPerMmPerAbsorbance;

    /// <summary>What these dots scatter, 1/mm.</summary>
    public double ScatteringPerMm => Lot.ScatteringPerMmPerMgPerMl * LoadingMgPerMl;

    /// <summary>What the dilute absorbance is multiplied with to give 1/mm in this layer.</summary>
    internal double AbsorptionPerMmPerAbsorbance =>
        Lot.FilmExtinctionFactor * LoadingMgPerMl * DotLot.PerMmFromDecadicPerCm;
}
