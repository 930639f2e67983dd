namespace FilmOptics.Reading;

/// <summary>One lot in a layer as the file gives it: by mg/mL or by wt%.</summary>
internal sealed record DotEntry(DotLot Lot, double? LoadingMgPerMl, double? WtPercent, Section Section)
{
    /// <summary>The entry, or null after a fault.</summary>
    public static DotEntry? Read(Section section, FilmParts parts)
    {
        string? name = section.RequiredText("lot");
        double? loadingMgPerMl = section.OptionalNumber("loading_mg_per_ml", NumberRule.AtLeastZero);
        double? wtPercent = section.OptionalNumber("loading_wt_percent", NumberRule.WtPercent);
        section.Close();
        if (name is not null)
            section.Path = $"{section.Path[..section.Path.LastIndexOf('[')]}[{name}]";
        LayerSection.RequireOneOf(section, "loading_mg_per_ml", "loading_wt_percent");
        if (name is null || !parts.RequireLot(name, section.Find("lot")!, section.PathOf("lot")))
            return null;
        return parts.Lot(name) is { } lot ? new(lot, loadingMgPerMl, wtPercent, section) : null;
    }

    /// <summary>All entries of a layer as mg/mL; null after a fault.</summary>
    /// <remarks>
    /// With W the sum of weight shares w, c the loadings given by volume and densities ρ, volumes that add give the layer's density
    /// ρ = (Σ c + ρ_host (1 − Σ c/ρ_c)) / (1 − W + ρ_host Σ w/ρ_w), and a lot given by weight has w ρ.
    /// </remarks>
    public static IReadOnlyList<DotLoading>? Mixed(IReadOnlyList<DotEntry> entries, Section layer, double? hostDensityGPerMl)
    {
        if (entries.All(entry => entry.WtPercent is null))
            return [.. entries.Select(entry => new DotLoading(entry.Lot, entry.LoadingMgPerMl ?? double.NaN))];
        if (!HaveDensities(entries, hostDensityGPerMl))
            return null;
        double weightShare = 0, weightVolume = 0, mass = 0, volume = 0;
        foreach (var entry in entries)
        {
            double densityGPerMl = entry.Lot.DensityGPerMl!.Value;
            weightShare += (entry.WtPercent ?? 0) / 100;
            weightVolume += (entry.WtPercent ?? 0) / 100 / densityGPerMl;
            mass += (entry.LoadingMgPerMl ?? 0) / 1000;
            volume += (entry.LoadingMgPerMl ?? 0) / 1000 / densityGPerMl;
        }

        double host = hostDensityGPerMl!.Value;
        if (weightShare >= 1 || volume >= 1)
        {
            string what = weightShare >= 1
                ? $"make up {Shown.Number(100 * weightShare)} % of the layer's weight" : $"fill {Shown.Number(100 * volume)} % of the layer's volume";
            layer.Fault("dots", $"{layer.PathOf("dots")} {what}; below 100 % is allowed.");
            return null;
        }

        double layerDensityGPerMl = (mass + (host * (1 - volume))) / (1 - weightShare + (host * weightVolume));
        return [.. entries.Select(entry => new DotLoading(
            entry.Lot, entry.WtPercent is { } percent ? percent * 10 * layerDensityGPerMl : entry.LoadingMgPerMl ?? double.NaN))];
    }

    /// <summary>The keys of the densities that are not given.</summary>
    public static List<string> MissingDensities(IEnumerable<DotLot> lots, double? hostDensityGPerMl)
    {
        var missing = lots.Where(lot => lot.DensityGPerMl is null).Select(lot => $"lots[{lot.Name}].density_g_per_ml").ToList();
        if (hostDensityGPerMl is null)
            missing.Insert(0, "host.density_g_per_ml");
        return missing;
    }

    private static bool HaveDensities(IReadOnlyList<DotEntry> entries, double? hostDensityGPerMl)
    {
        var missing = MissingDensities(entries.Select(entry => entry.Lot), hostDensityGPerMl);
        if (missing.Count == 0)
            return true;
        var byWeight = entries.First(entry => entry.WtPercent is not null).Section;
        byWeight.Fault("loading_wt_percent", $"{byWeight.PathOf("loading_wt_percent")} needs densities; missing: {string.Join(", ", missing)}.");
        return false;
    }
}
