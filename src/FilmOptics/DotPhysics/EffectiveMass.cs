namespace FilmOptics;

/// <summary>Band edge of a dot in the effective-mass picture: confinement of electron and hole, and their attraction.</summary>
/// <remarks>
/// Source: Brus, J. Chem. Phys. 80, 4403 (1984). Known to fail: much too blue for small dots (CdSe of 1.5 nm radius: 3.24 eV against 2.3
/// measured), since the real barrier is finite and the bands are not parabolic.
/// </remarks>
public static class EffectiveMass
{
    /// <summary>ħ²/(2 m₀), eV nm² (CODATA 2018).</summary>
    public const double ConfinementEvNm2 = 0.0380998212;

    /// <summary>e²/(4π ε₀), eV nm (CODATA 2018).</summary>
    public const double CoulombEvNm = 1.43996455;

    /// <summary>Bohr radius of hydrogen, nm.</summary>
    public const double HydrogenRadiusNm = 0.0529177211;

    /// <summary>Rydberg energy of hydrogen, eV.</summary>
    public const double HydrogenEnergyEv = 13.6056931;

    /// <summary>Energy × wavelength of a photon, eV nm.</summary>
    public const double PhotonEvNm = 1239.841984;

    // First-order attraction of a pair in an infinite well.
    private const double AttractionFactor = 1.786;

    /// <summary>Band edge behind infinite walls: E = E_g + ħ²π²/(2 µ R²) − 1.786 e²/(4π ε₀ ε R), eV.</summary>
    /// <param name="material">Material.</param>
    /// <param name="radiusNm">Radius of the dot, nm, above 0.</param>
    public static double BandEdgeEv(Semiconductor material, double radiusNm)
    {
        ArgumentNullException.ThrowIfNull(material);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(radiusNm);
        return material.GapEv
            + (ConfinementEvNm2 * Math.PI * Math.PI / (radiusNm * radiusNm * material.ReducedMassFactor))
            - AttractionEv(material, radiusNm);
    }

    /// <summary>Band edge of a core in a shell and a matrix of finite barriers, eV: each carrier's level from <see cref="SphericalWell"/>.</summary>
    /// <param name="core">Material of the core.</param>
    /// <param name="radiusNm">Radius of the core, nm.</param>
    /// <param name="shell">Material of the shell; null for a bare core.</param>
    /// <param name="shellNm">Thickness of the shell, nm.</param>
    /// <param name="barrierEv">Height of the matrix above the core's band edges, for both carriers, eV.</param>
    /// <returns>Null where a carrier is not bound.</returns>
    /// <exception cref="Colorimetry.InputException">A band edge is not known, so that there is no offset.</exception>
    public static double? BandEdgeEv(Semiconductor core, double radiusNm, Semiconductor? shell, double shellNm, double barrierEv)
    {
        ArgumentNullException.ThrowIfNull(core);
        double electronOffset = 0, holeOffset = 0;
        if (shell is not null)
        {
            electronOffset = Level(shell.ElectronLevelEv, shell) - Level(core.ElectronLevelEv, core);
            holeOffset = Level(core.HoleLevelEv, core) - Level(shell.HoleLevelEv, shell);
        }

        double? electron = Carrier(core.ElectronMassFactor, shell?.ElectronMassFactor, electronOffset);
        double? hole = Carrier(core.HoleMassFactor, shell?.HoleMassFactor, holeOffset);
        return core.GapEv + electron + hole - AttractionEv(core, radiusNm);

        double? Carrier(double massFactor, double? shellMassFactor, double offsetEv) => SphericalWell.GroundStateEv(
            shellMassFactor is { } shellMass
                ? [new(radiusNm, massFactor, 0), new(radiusNm + shellNm, shellMass, offsetEv)]
                : [new(radiusNm, massFactor, 0)],
            barrierEv);
    }

    /// <summary>Radius whose band edge is at an energy, nm; null where none up to 50 nm is.</summary>
    /// <param name="material">Material.</param>
    /// <param name="bandEdgeEv">Band edge, eV.</param>
    public static double? RadiusNm(Semiconductor material, double bandEdgeEv)
    {
        // The edge falls with the radius up to where the attraction wins over the confinement.
        ArgumentNullException.ThrowIfNull(material);
        double low = 0.2, high = 2 * ConfinementEvNm2 * Math.PI * Math.PI * material.PermittivityFactor / (material.ReducedMassFactor * AttractionFactor * CoulombEvNm);
        if (!(BandEdgeEv(material, low) > bandEdgeEv && BandEdgeEv(material, high) < bandEdgeEv))
            return null;
        while (high - low > 1e-9)
        {
            double middle = (low + high) / 2;
            (low, high) = BandEdgeEv(material, middle) > bandEdgeEv ? (middle, high) : (low, middle);
        }

        return (low + high) / 2;
    }

    private static double AttractionEv(Semiconductor material, double radiusNm) => AttractionFactor * CoulombEvNm / (material.PermittivityFactor * radiusNm);

    private static double Level(double? levelEv, Semiconductor material) => levelEv
        ?? throw new Colorimetry.InputException(new Colorimetry.InputFault("shell", null, null, $"the band edges of {material.Name} against vacuum are not known, so that a shell has no offset."));
}
