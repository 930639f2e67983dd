using Colorimetry;

namespace FilmOptics;

/// <summary>Bulk constants of a dot's material at 300 K.</summary>
/// <param name="Name">Formula.</param>
/// <param name="GapEv">Gap, eV.</param>
/// <param name="ElectronMassFactor">Effective mass of the electron ÷ its rest mass.</param>
/// <param name="HoleMassFactor">Effective mass of the hole ÷ the electron's rest mass.</param>
/// <param name="PermittivityFactor">Relative permittivity that screens the pair.</param>
/// <param name="ElectronLevelEv">Conduction band edge against vacuum, eV; null where none is known.</param>
/// <param name="DensityGPerMl">Density, g/mL.</param>
/// <param name="Source">Where the constants come from; those of effective-mass work vary from source to source.</param>
public sealed record Semiconductor(
    string Name, double GapEv, double ElectronMassFactor, double HoleMassFactor, double PermittivityFactor, double? ElectronLevelEv, double DensityGPerMl, string Source)
{
    private const string Handbook = "handbook-type values, from memory; they vary by source";

    // Conduction edges against vacuum: from memory, good to some 0.2 eV; offsets between two rows are what a shell needs.
    private static readonly Semiconductor[] Table =
    [
        new("CdSe", 1.74, 0.13, 0.45, 10.6, -4.00, 5.82, Handbook),
        new("CdS", 2.42, 0.21, 0.80, 5.7, -3.75, 4.82, Handbook),
        new("CdTe", 1.50, 0.11, 0.35, 10.2, -3.60, 5.85, Handbook),
        new("InP", 1.344, 0.0795, 0.60, 12.4, -4.40, 4.81, $"electron mass Vurgaftman et al. 2001; else {Handbook}"),
        new("ZnSe", 2.70, 0.16, 0.57, 9.1, -3.70, 5.27, Handbook),
        new("ZnS", 3.61, 0.28, 0.61, 8.9, -3.10, 4.09, Handbook),
        new("CsPbBr3", 2.33, 0.15, 0.14, 7.3, null, 4.75, $"gap between 2.30 and 2.36 eV; {Handbook}"),
    ];

    /// <summary>α, eV/K, and β, K, of Varshni's law; null where none is known. InP: Vurgaftman et al. 2001; CdSe dots: from memory.</summary>
    public (double AlphaEvPerKelvin, double BetaKelvin)? Varshni => Name switch
    {
        "CdSe" => (3.2e-4, 220),
        "InP" => (3.63e-4, 162),
        _ => null,
    };

    /// <summary>All of them.</summary>
    public static IReadOnlyList<Semiconductor> All => Table;

    /// <summary>Valence band edge against vacuum, eV; null where none is known.</summary>
    public double? HoleLevelEv => ElectronLevelEv - GapEv;

    /// <summary>Reduced mass of the pair ÷ the electron's rest mass.</summary>
    public double ReducedMassFactor => 1 / ((1 / ElectronMassFactor) + (1 / HoleMassFactor));

    /// <summary>Bohr radius of the pair in the bulk, nm.</summary>
    public double BohrRadiusNm => PermittivityFactor / ReducedMassFactor * EffectiveMass.HydrogenRadiusNm;

    /// <summary>Rydberg energy of the pair in the bulk, meV.</summary>
    public double RydbergMev => ReducedMassFactor / (PermittivityFactor * PermittivityFactor) * EffectiveMass.HydrogenEnergyEv * 1000;

    /// <summary>A material by its formula.</summary>
    /// <exception cref="InputException">There is none of that name.</exception>
    public static Semiconductor Named(string name) => Array.Find(Table, material => string.Equals(material.Name, name, StringComparison.OrdinalIgnoreCase))
        ?? throw new InputException(new InputFault("material", null, null, $"'{name}' is not known; there are {string.Join(", ", Table.Select(material => material.Name))}."));

    /// <summary>A mixed crystal: Vegard's law with bowing for the gap and for the masses, linear for the rest.</summary>
    /// <remarks>E(x) = x E_A + (1 − x) E_B − b x (1 − x), and 1/m likewise: an alloy's mass may so fall below both parents'.</remarks>
    /// <param name="a">Material at x = 1.</param>
    /// <param name="b">Material at x = 0.</param>
    /// <param name="share">x, 0 to 1, of formula units.</param>
    /// <param name="gapBowingEv">b of the gap, eV.</param>
    /// <param name="inverseMassBowingFactor">b of 1/m of the electron; below 0 makes the alloy lighter than the line between its parents.</param>
    public static Semiconductor Alloy(Semiconductor a, Semiconductor b, double share, double gapBowingEv, double inverseMassBowingFactor = 0)
    {
        ArgumentNullException.ThrowIfNull(a);
        ArgumentNullException.ThrowIfNull(b);
        if (!(share is >= 0 and <= 1))
            throw new ArgumentOutOfRangeException(nameof(share), share, "A share lies between 0 and 1.");
        double Mix(double one, double other, double bowing = 0) => (share * one) + ((1 - share) * other) - (bowing * share * (1 - share));
        double gap = Mix(a.GapEv, b.GapEv, gapBowingEv);
        double inverse = Mix(1 / a.ElectronMassFactor, 1 / b.ElectronMassFactor, inverseMassBowingFactor);
        if (!(gap > 0) || !(inverse > 0))
            throw new ArgumentOutOfRangeException(nameof(gapBowingEv), gapBowingEv, "So much bowing leaves no gap or no mass.");

        // The bowing of the gap is put into the conduction band.
        double? level = Mix(a.HoleLevelEv ?? double.NaN, b.HoleLevelEv ?? double.NaN) + gap;
        return new(
            FormattableString.Invariant($"{a.Name} {share:0.##} in {b.Name}"),
            gap,
            1 / inverse,
            Mix(a.HoleMassFactor, b.HoleMassFactor),
            Mix(a.PermittivityFactor, b.PermittivityFactor),
            double.IsNaN(level.Value) ? null : level,
            Mix(a.DensityGPerMl, b.DensityGPerMl),
            $"Vegard's law between {a.Name} and {b.Name} with a bowing of {FormattableString.Invariant($"{gapBowingEv}")} eV");
    }
}
