namespace Colorimetry;

/// <summary>What the columns of a unit are called, which values they may have and how far apart their rows may stand.</summary>
/// <param name="Columns">Names that hold this unit.</param>
/// <param name="LowestValue">Least value allowed.</param>
/// <param name="HighestValue">Greatest value allowed.</param>
/// <param name="WidestGapNm">
/// Widest step that interpolation may bridge, nm. Common practice, no source: emission lines and absorption edges are some 20 nm wide and
/// need rows every 10 nm; filters are measured up to every 20 nm; coefficients of resins and particles vary slowly.
/// </param>
internal sealed record SpectralQuantity(string[] Columns, double LowestValue, double HighestValue, double WidestGapNm)
{
    /// <summary>Share of the peak below which light and noise count as nothing.</summary>
    public const double NothingShare = 0.001;

    private static readonly Dictionary<Type, SpectralQuantity> ByUnit = new()
    {
        [typeof(WattPerNm)] = new(["power_per_nm"], 0, double.PositiveInfinity, 10),
        [typeof(PhotonPerNm)] = new(["photons_per_nm"], 0, double.PositiveInfinity, 10),
        [typeof(AbsorbancePerCm)] = new(["absorbance_per_cm"], 0, double.PositiveInfinity, 10),
        [typeof(Fraction)] = new(["transmittance", "reflectance", "absorptance", "red", "green", "blue"], 0, 1, 20),
        [typeof(PerMm)] = new(["absorption_per_mm", "scattering_per_mm"], 0, double.PositiveInfinity, 50),
        [typeof(RefractiveIndex)] = new(["refractive_index"], 0.1, 10, 50),
        // Open interval: −1 and 1 themselves would scatter straight back or not at all.
        [typeof(MeanCosine)] = new(["anisotropy"], Math.BitIncrement(-1.0), Math.BitDecrement(1.0), 50),
    };

    /// <summary>The quantity of a unit.</summary>
    public static SpectralQuantity Of<TUnit>()
        where TUnit : struct, ISpectralUnit => ByUnit[typeof(TUnit)];

    /// <summary>What is allowed, in words.</summary>
    public string AllowedValues => (LowestValue, HighestValue) switch
    {
        (0.1, _) => "0.1 to 10 is allowed",
        (< 0, _) => "more than -1 and less than 1 is allowed",
        (_, double.PositiveInfinity) => "at least 0 is allowed",
        _ => "0 to 1 is allowed",
    };
}
