using Colorimetry;

namespace FilmOptics;

/// <summary>One lot of dots as it behaves in the cured film.</summary>
public sealed record DotLot
{
    /// <summary>1/mm (base e) for a decadic absorbance per cm: ln 10 / 10.</summary>
    internal static readonly double PerMmFromDecadicPerCm = Math.Log(10) / 10;

    /// <summary>Name, unique in the film file.</summary>
    public required string Name { get; init; }

    /// <summary>Decadic absorbance per cm at 1 mg/mL as measured, dilute.</summary>
    public required Spectrum<AbsorbancePerCm> Absorbance { get; init; }

    /// <summary>Emission in the film (shift applied): photons per emitted photon in each 1 nm bin, sum 1.</summary>
    public required Spectrum<PhotonPerNm> Emission { get; init; }

    /// <summary>Photoluminescence quantum yield of the dilute sample, 0…1.</summary>
    public required double QuantumYieldShare { get; init; }

    /// <summary>In the cured film ÷ dilute; above 0; yield times factor ≤ 1.</summary>
    public double FilmYieldFactor { get; init; } = 1;

    /// <summary>Absorbance in the cured film ÷ dilute; above 0.</summary>
    public double FilmExtinctionFactor { get; init; } = 1;

    /// <summary>Shift of the emission line from dilute to film, nm; already in <see cref="Emission"/>.</summary>
    public double FilmEmissionShiftNm { get; init; }

    /// <summary>What the dots scatter by themselves (clumps), 1/mm at 1 mg/mL, at least 0; it has the anisotropy of the layer.</summary>
    public double ScatteringPerMmPerMgPerMl { get; init; }

    /// <summary>Density of the dots with their ligand, g/mL; null where unknown.</summary>
    public double? DensityGPerMl { get; init; }

    /// <summary>Cadmium, share of the mass with ligand; null where unknown.</summary>
    public double? CadmiumMassShare { get; init; }

    /// <summary>Lead, share of the mass with ligand; null where unknown.</summary>
    public double? LeadMassShare { get; init; }

    /// <summary>Price per gram of dots with ligand, in the user's currency; null where unknown.</summary>
    public double? PricePerG { get; init; }

    /// <summary>Dots in the delivered concentrate, wt%; null where unknown.</summary>
    public double? StockWtPercent { get; init; }

    /// <summary>Quantum yield in the film, 0…1.</summary>
    public double FilmYieldShare => QuantumYieldShare * FilmYieldFactor;

    /// <summary>Decadic absorbance per cm at 1 mg/mL in the film.</summary>
    public Spectrum<AbsorbancePerCm> FilmAbsorbance => Absorbance.ScaledBy(FilmExtinctionFactor);
}
