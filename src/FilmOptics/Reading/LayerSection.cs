using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads the items of `layers`.</summary>
internal sealed class LayerSection
{
    private readonly FilmParts _parts;
    private readonly Section _section;

    private LayerSection(Section section, FilmParts parts) => (_section, _parts) = (section, parts);

    /// <summary>The layer, or null after a fault.</summary>
    public static Layer? Read(Section section, int index, FilmParts parts, SpectrumLoader loader)
    {
        string? name = section.RequiredText("name");
        section.Path = name is null ? $"layers[{index}]" : $"layers[{name}]";
        return new LayerSection(section, parts).Read(name, loader);
    }

    private Layer? Read(string? name, SpectrumLoader loader)
    {
        double refractiveIndex = _section.Number("refractive_index", NumberRule.RefractiveIndex, _parts.HostRefractiveIndex);
        var absorption = loader.NumberOrSpectrum<PerMm>(_section, "absorption_per_mm", NumberRule.AtLeastZero, SpectrumKind.Absorption);
        var particles = ParticleSection.Read(_section, refractiveIndex, _parts, loader);
        var scattering = loader.NumberOrSpectrum<PerMm>(_section, "scattering_per_mm", NumberRule.AtLeastZero, SpectrumKind.Scattering);
        double anisotropy = _section.Number("anisotropy", NumberRule.Anisotropy, 0);
        double? thicknessUm = _section.OptionalNumber("thickness_um", NumberRule.ThicknessUm);
        double? coatWeight = _section.OptionalNumber("coat_weight_g_per_m2", NumberRule.AboveZero);
        var entries = Dots();
        _section.Close();
        RequireOneOf(_section, "thickness_um", "coat_weight_g_per_m2");
        var dots = entries is null ? null : DotEntry.Mixed(entries, _section, _parts.HostDensityGPerMl);
        if (_section.Has("particles"))
        {
            foreach (string key in (string[])["scattering_per_mm", "anisotropy"])
            {
                if (_section.Has(key))
                    _section.Fault(key, $"{_section.Path} has particles and {key}; particles bring their own, so give one of them.");
            }
        }

        if (dots is null || absorption is null || scattering is null || name is null || double.IsNaN(anisotropy)
            || dots.Any(dot => double.IsNaN(dot.ScatteringPerMm))
            || (particles is null && _section.Has("particles")))
        {
            return null;
        }

        var layer = new Layer
        {
            Name = name,
            ThicknessMm = (thicknessUm ?? double.NaN) / 1000,
            RefractiveIndex = refractiveIndex,
            HostAbsorption = absorption,
            Scattering = particles?.Scattering ?? scattering,
            Anisotropy = particles?.Anisotropy ?? Spectrum.Flat<MeanCosine>(anisotropy, "film file"),
            Dots = [],
            HostDensityGPerMl = _parts.HostDensityGPerMl,
        }.WithDots(dots);
        if (Loadings.DotVolumeShare(layer) is >= 1 and var share)
        {
            _section.Fault("dots", $"{_section.PathOf("dots")} fill {Shown.Number(100 * share)} % of the layer's volume; below 100 % is allowed.");
            return null;
        }

        return coatWeight is { } weight && thicknessUm is null ? WithCoatWeight(layer, weight) : layer;
    }

    /// <summary>Faults unless exactly one of two keys is there.</summary>
    public static void RequireOneOf(Section section, string first, string second)
    {
        bool hasFirst = section.Has(first), hasSecond = section.Has(second);
        if (hasFirst && hasSecond)
            section.Fault(second, $"{section.Path} has {first} and {second}; give one of them.");
        else if (!hasFirst && !hasSecond)
            section.Faults.Add(section.Place, $"{section.Path} has no {first} and no {second}; one of them is required.");
    }

    private Layer? WithCoatWeight(Layer layer, double coatWeightGPerM2)
    {
        string key = _section.PathOf("coat_weight_g_per_m2");
        if (Loadings.DensityGPerMl(layer) is not { } densityGPerMl)
        {
            var missing = DotEntry.MissingDensities(layer.Dots.Select(dots => dots.Lot), _parts.HostDensityGPerMl);
            _section.Fault("coat_weight_g_per_m2", $"{key} needs densities to become a thickness; missing: {string.Join(", ", missing)}.");
            return null;
        }

        double thicknessUm = coatWeightGPerM2 / densityGPerMl;
        if (NumberRule.ThicknessUm.Allows(thicknessUm) || double.IsNaN(thicknessUm))
            return layer with { ThicknessMm = thicknessUm / 1000 };
        _section.Fault("coat_weight_g_per_m2",
            $"{key} is {Shown.Number(coatWeightGPerM2)}, which is {Shown.Number(thicknessUm)} µm; allowed is {NumberRule.ThicknessUm.Words}.");
        return null;
    }

    private List<DotEntry>? Dots()
    {
        if (_section.List("dots") is not { } items)
            return null;
        var entries = new List<DotEntry>();
        bool areWhole = true;
        for (int i = 0; i < items.Count; i++)
        {
            var section = _section.SectionOf(items[i], $"{_section.PathOf("dots")}[{i}]");
            var entry = section is null ? null : DotEntry.Read(section, _parts);
            if (entry is null)
                areWhole = false;
            else if (entries.Exists(other => other.Lot.Name == entry.Lot.Name))
                section!.Fault("lot", $"The lot {Shown.Quoted(entry.Lot.Name)} stands twice in {_section.Path}; once is allowed.");
            else
                entries.Add(entry);
        }

        return areWhole ? entries : null;
    }
}
