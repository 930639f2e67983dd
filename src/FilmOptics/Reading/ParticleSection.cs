using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads `particles` of a layer: spheres that scatter, in place of scattering_per_mm and anisotropy.</summary>
internal static class ParticleSection
{
    /// <summary>What the particles do to light; null where there are none, or after a fault.</summary>
    public static ParticleScattering? Read(Section layer, double layerIndex, FilmParts parts, SpectrumLoader loader)
    {
        if (layer.Inner("particles") is not { } section)
            return null;
        double radiusUm = section.RequiredNumber("radius_um", NumberRule.ParticleRadiusUm);
        if (section.Required("refractive_index") is null)
            return null;
        var index = loader.NumberOrSpectrum<RefractiveIndex>(section, "refractive_index", NumberRule.ParticleIndex, SpectrumKind.ParticleIndex);
        double spread = section.Number("size_spread_factor", NumberRule.SizeSpread, 1);
        double? volumeShare = VolumeShare(section, parts);
        section.Close();
        if (index is null || volumeShare is not { } share || double.IsNaN(radiusUm + spread + share + layerIndex))
            return null;
        var scattering = new ParticleLoading { RadiusUm = radiusUm, Index = index, VolumeShare = share, SizeSpreadFactor = spread }.In(layerIndex);
        foreach (string warning in scattering.Warnings)
            loader.Warn($"{section.Path}: {warning}");
        return scattering;
    }

    private static double? VolumeShare(Section section, FilmParts parts)
    {
        LayerSection.RequireOneOf(section, "volume_percent", "weight_percent");
        double? volumePercent = section.OptionalNumber("volume_percent", NumberRule.WtPercent);
        double? weightPercent = section.OptionalNumber("weight_percent", NumberRule.WtPercent);
        double? densityGPerMl = section.OptionalNumber("density_g_per_ml", NumberRule.DensityGPerMl);
        if (volumePercent is { } volume)
            return volume / 100;
        if (weightPercent is not { } weight)
            return null;
        if (densityGPerMl is { } particle && parts.HostDensityGPerMl is { } host)
            return double.IsNaN(weight + particle) ? null : ParticleLoading.VolumeShareFromWeight(weight, particle, host);
        string missing = densityGPerMl is null ? section.PathOf("density_g_per_ml") : "host.density_g_per_ml";
        section.Fault("weight_percent", $"{section.PathOf("weight_percent")} needs densities to become a volume; missing: {missing}.");
        return null;
    }
}
