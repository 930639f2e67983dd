namespace FilmOptics;

/// <summary>Absolute scale of a dot's absorption far above its gap, where it goes with the volume alone.</summary>
public static class DotAbsorption
{
    private const double AvogadroPerMol = 6.02214076e23;

    /// <summary>Cross-section of a CdSe dot at 350 nm, cm²: Leatherdale et al., J. Phys. Chem. B 106, 7619 (2002).</summary>
    /// <param name="radiusNm">Radius, nm.</param>
    public static double CdSe350CrossSectionCm2(double radiusNm) => 5.501e5 * Math.Pow(radiusNm * 1e-7, 3);

    /// <summary>Decadic molar extinction of a cross-section, 1/(M cm): σ N_A/(1000 ln 10).</summary>
    /// <param name="crossSectionCm2">Cross-section, cm².</param>
    public static double ExtinctionPerMPerCm(double crossSectionCm2) => crossSectionCm2 * AvogadroPerMol / (1000 * Math.Log(10));

    /// <summary>Intrinsic absorption coefficient of a cross-section, 1/cm, base e: σ over the dot's volume.</summary>
    /// <param name="crossSectionCm2">Cross-section, cm².</param>
    /// <param name="radiusNm">Radius, nm.</param>
    public static double IntrinsicPerCm(double crossSectionCm2, double radiusNm) =>
        crossSectionCm2 / (4.0 / 3 * Math.PI * Math.Pow(radiusNm * 1e-7, 3));

    /// <summary>Intrinsic absorption coefficient from the bulk's constants by the local field of a small sphere, 1/cm, base e.</summary>
    /// <remarks>µ = 2π/(λ n_s) |f|² Im ε, f = 3 ε_s/(ε + 2 ε_s): Ricard, Ghanassi and Schanne-Klein 1994; Hens and Moreels 2012 (from memory).</remarks>
    /// <param name="wavelengthNm">Wavelength in vacuum, nm.</param>
    /// <param name="bulkIndex">n of the bulk.</param>
    /// <param name="bulkExtinctionIndex">k of the bulk.</param>
    /// <param name="hostIndex">n of what surrounds the dot.</param>
    public static double LocalFieldPerCm(double wavelengthNm, double bulkIndex, double bulkExtinctionIndex, double hostIndex) =>
        2 * Math.PI / (wavelengthNm * 1e-7 * hostIndex) * LocalFieldFactor(bulkIndex, bulkExtinctionIndex, hostIndex) * (2 * bulkIndex * bulkExtinctionIndex);

    /// <summary>|f|² of the local field.</summary>
    /// <inheritdoc cref="LocalFieldPerCm"/>
    public static double LocalFieldFactor(double bulkIndex, double bulkExtinctionIndex, double hostIndex)
    {
        double real = (bulkIndex * bulkIndex) - (bulkExtinctionIndex * bulkExtinctionIndex), imaginary = 2 * bulkIndex * bulkExtinctionIndex, host = hostIndex * hostIndex;
        return 9 * host * host / (Math.Pow(real + (2 * host), 2) + (imaginary * imaginary));
    }

    /// <summary>Decadic absorbance per cm at 1 mg/mL of an intrinsic coefficient.</summary>
    /// <param name="intrinsicPerCm">Absorption coefficient of the dot's material, 1/cm, base e.</param>
    /// <param name="densityGPerMl">Density of that material, g/mL.</param>
    /// <param name="coreMassShare">That material's share of the weighed mass with shell and ligand, 0 to 1.</param>
    public static double AbsorbancePerCmPerMgPerMl(double intrinsicPerCm, double densityGPerMl, double coreMassShare) =>
        intrinsicPerCm * coreMassShare / (1000 * densityGPerMl * Math.Log(10));
}
