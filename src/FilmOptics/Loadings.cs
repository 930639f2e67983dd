namespace FilmOptics;

/// <summary>Dots in a cured layer by mass per volume (mg/mL), by weight (wt%) and by volume, and what the layer weighs.</summary>
/// <remarks>
/// Dots are weighed with their ligand, and volumes add: that is all there is to it. Densities in g/mL.
/// Source of the relations: definitions of mass concentration, mass fraction and volume fraction (ISO 80000-9).
/// </remarks>
public static class Loadings
{
    /// <summary>Volume share of dots at a weight share.</summary>
    /// <param name="wtPercent">Dots of the cured layer's mass, 0 to 100 %.</param>
    /// <param name="dotDensityGPerMl">Dots with ligand, g/mL.</param>
    /// <param name="hostDensityGPerMl">Cured host, g/mL.</param>
    public static double VolumeShareFromWtPercent(double wtPercent, double dotDensityGPerMl, double hostDensityGPerMl)
    {
        double dots = wtPercent / 100 / dotDensityGPerMl, host = (1 - (wtPercent / 100)) / hostDensityGPerMl;
        return dots / (dots + host);
    }

    /// <summary>Weight percent of dots at a volume share.</summary>
    /// <param name="volumeShare">Dots of the layer's volume, 0 to 1.</param>
    /// <param name="dotDensityGPerMl">Dots with ligand, g/mL.</param>
    /// <param name="hostDensityGPerMl">Cured host, g/mL.</param>
    public static double WtPercentFromVolumeShare(double volumeShare, double dotDensityGPerMl, double hostDensityGPerMl)
    {
        double dots = volumeShare * dotDensityGPerMl, host = (1 - volumeShare) * hostDensityGPerMl;
        return 100 * dots / (dots + host);
    }

    /// <summary>Volume share of dots at a mass loading.</summary>
    /// <param name="loadingMgPerMl">Dots per volume of cured layer, mg/mL.</param>
    /// <param name="dotDensityGPerMl">Dots with ligand, g/mL.</param>
    public static double VolumeShareFromMgPerMl(double loadingMgPerMl, double dotDensityGPerMl) => loadingMgPerMl / (1000 * dotDensityGPerMl);

    /// <summary>Mass loading, mg/mL, at a volume share.</summary>
    /// <param name="volumeShare">Dots of the layer's volume, 0 to 1.</param>
    /// <param name="dotDensityGPerMl">Dots with ligand, g/mL.</param>
    public static double MgPerMlFromVolumeShare(double volumeShare, double dotDensityGPerMl) => 1000 * volumeShare * dotDensityGPerMl;

    /// <summary>Mass loading, mg/mL, of one lot alone at a weight share.</summary>
    /// <param name="wtPercent">Dots of the cured layer's mass, 0 to 100 %.</param>
    /// <param name="dotDensityGPerMl">Dots with ligand, g/mL.</param>
    /// <param name="hostDensityGPerMl">Cured host, g/mL.</param>
    public static double MgPerMlFromWtPercent(double wtPercent, double dotDensityGPerMl, double hostDensityGPerMl) =>
        MgPerMlFromVolumeShare(VolumeShareFromWtPercent(wtPercent, dotDensityGPerMl, hostDensityGPerMl), dotDensityGPerMl);

    /// <summary>Weight percent of one lot alone at a mass loading.</summary>
    /// <param name="loadingMgPerMl">Dots per volume of cured layer, mg/mL.</param>
    /// <param name="dotDensityGPerMl">Dots with ligand, g/mL.</param>
    /// <param name="hostDensityGPerMl">Cured host, g/mL.</param>
    public static double WtPercentFromMgPerMl(double loadingMgPerMl, double dotDensityGPerMl, double hostDensityGPerMl) =>
        WtPercentFromVolumeShare(VolumeShareFromMgPerMl(loadingMgPerMl, dotDensityGPerMl), dotDensityGPerMl, hostDensityGPerMl);

    /// <summary>Volume share of all dots in a layer; null where a lot in it has no density.</summary>
    public static double? DotVolumeShare(Layer layer)
    {
        ArgumentNullException.ThrowIfNull(layer);
        return layer.Dots.Aggregate((double?)0, (share, dots) =>
            share + (dots.LoadingMgPerMl == 0 ? 0 : dots.LoadingMgPerMl / (1000 * dots.Lot.DensityGPerMl)));
    }

    /// <summary>Density of a cured layer with its dots, g/mL; null where the host's or a lot's is unknown.</summary>
    public static double? DensityGPerMl(Layer layer)
    {
        ArgumentNullException.ThrowIfNull(layer);
        return ((1 - DotVolumeShare(layer)) * layer.HostDensityGPerMl) + (layer.Dots.Sum(dots => dots.LoadingMgPerMl) / 1000);
    }

    /// <summary>Mass of a cured layer per area, g/m²: thickness in µm times density in g/mL; null where a density is unknown.</summary>
    public static double? CoatWeightGPerM2(Layer layer) => DensityGPerMl(layer) * layer.ThicknessMm * 1000;

    /// <summary>Weight percent of each lot in a layer, in the order of <see cref="Layer.Dots"/>; null where a density is unknown.</summary>
    public static IReadOnlyList<double?> WtPercents(Layer layer)
    {
        double? densityGPerMl = DensityGPerMl(layer);
        return [.. layer.Dots.Select(dots => dots.LoadingMgPerMl / 10 / densityGPerMl)];
    }
}
