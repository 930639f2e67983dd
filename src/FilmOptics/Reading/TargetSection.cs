namespace FilmOptics.Reading;

/// <summary>Reads `target`.</summary>
internal static class TargetSection
{
    // Bounds of a free loading where the file gives none; the contract of the film file.
    private const double DefaultMaxMgPerMl = 500;
    private const double DefaultToleranceXy = 0.0005;

    private static readonly string[] Gamuts = ["BT.709", "BT.2020", "DCI-P3", "P3-D65", "Adobe RGB (1998)", "NTSC 1953"];

    public static WhiteTarget? Read(Section section, FilmParts parts, bool hasPanel, IncidenceKind? incidence)
    {
        string? at = section.Word("at", "film", "panel");
        if (at == "panel" && !hasPanel)
            section.Fault("at", $"{section.PathOf("at")} is panel, but the file has no panel; give one, or film.");
        var place = at switch { "film" => TargetPlace.Film, "panel" => TargetPlace.Panel, _ => hasPanel ? TargetPlace.Panel : TargetPlace.Film };
        var view = section.Word("view", "hemisphere", "normal") == "normal" ? TargetView.Normal : TargetView.Hemisphere;
        if (view == TargetView.Normal && incidence == IncidenceKind.Normal)
        {
            section.Fault("view",
                $"{section.PathOf("view")} is normal with backlight.incidence normal: a beam along the normal has no radiance; "
                + "give hemisphere, or another incidence.");
        }

        var white = section.Required("white_xy") is { } value ? White(section, value) : null;
        double toleranceXy = section.Number("tolerance_xy", NumberRule.AboveZero, DefaultToleranceXy);
        var free = Free(section, parts);
        var gamuts = GamutNames(section);
        section.Close();
        return white is null || free is null ? null : new(place, view, white[0], white[1], toleranceXy, free, gamuts);
    }

    private static double[]? White(Section section, Node value)
    {
        string key = section.PathOf("white_xy");
        if (value is not ListNode { Items.Count: 2 } list)
        {
            string found = value is ListNode other ? $"a list of {other.Items.Count}" : value.Described;
            section.Faults.Add(value.Place, $"{key} is {found}; a list of two is due: x, y.");
            return null;
        }

        double[] xy = [.. list.Items.Select((item, i) => section.NumberOf(item, $"white_xy[{i}]", NumberRule.Share))];
        if (!(xy[0] + xy[1] > 1) && !(xy[1] == 0))
            return xy;
        section.Faults.Add(value.Place, $"{key} is [{Shown.Number(xy[0])}, {Shown.Number(xy[1])}]; a colour has y above 0 and x + y at most 1.");
        return null;
    }

    private static List<FreeLoading>? Free(Section section, FilmParts parts)
    {
        if (!section.Has("free"))
            return parts.UsedLotNames.Count == 2 ? [.. parts.UsedLotNames.Select(name => new FreeLoading(name))] : [];
        if (section.List("free") is not { } items)
            return null;
        var free = new List<FreeLoading>();
        for (int i = 0; i < items.Count; i++)
        {
            if (FreeLot(section, items[i], i, parts) is not { } loading)
                continue;
            if (free.Exists(other => other.LotName == loading.LotName))
                section.Faults.Add(items[i].Place, $"The lot {Shown.Quoted(loading.LotName)} stands twice in {section.PathOf("free")}; once is allowed.");
            free.Add(loading);
        }

        if (items.Count != 2)
        {
            string lots = items.Count == 1 ? "1 lot" : $"{items.Count} lots";
            section.Fault("free", $"{section.PathOf("free")} names {lots}; two are due, to meet the two coordinates of white.");
        }

        return free;
    }

    private static FreeLoading? FreeLot(Section section, Node item, int index, FilmParts parts)
    {
        string path = $"{section.PathOf("free")}[{index}]";
        if (item is not MappingNode)
            return section.TextOf(item, path) is { } text && IsUsed(text, item, path, section, parts) ? new(text) : null;
        var entry = section.SectionOf(item, path)!;
        string? name = entry.RequiredText("lot");
        double min = entry.Number("min_mg_per_ml", NumberRule.AtLeastZero, 0);
        double max = entry.Number("max_mg_per_ml", NumberRule.AboveZero, DefaultMaxMgPerMl);
        entry.Close();
        if (min >= max)
        {
            entry.Fault(entry.Has("min_mg_per_ml") ? "min_mg_per_ml" : "max_mg_per_ml",
                $"{path} has min_mg_per_ml {Shown.Number(min)} and max_mg_per_ml {Shown.Number(max)}; the minimum has to be below.");
        }

        return name is not null && IsUsed(name, entry.Find("lot")!, entry.PathOf("lot"), section, parts) ? new(name, min, max) : null;
    }

    private static bool IsUsed(string name, Node at, string fullKey, Section section, FilmParts parts)
    {
        if (!parts.RequireLot(name, at, fullKey))
            return false;
        if (parts.UsedLotNames.Contains(name) || parts.HasUnknownLot)
            return true;
        section.Faults.Add(at.Place, $"{fullKey} is {Shown.Quoted(name)}, which no layer holds; a lot of the layers is due.");
        return false;
    }

    private static List<string> GamutNames(Section section)
    {
        var names = new List<string>();
        foreach (var item in section.List("gamuts") ?? [])
        {
            if (section.WordOf(item, section.PathOf("gamuts"), Gamuts) is { } name && !names.Contains(name))
                names.Add(name);
        }

        return names;
    }
}
