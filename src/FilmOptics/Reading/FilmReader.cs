using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Turns the tree of a film file into a film case, section by section.</summary>
internal sealed class FilmReader
{
    private readonly FaultList _faults;
    private readonly List<string> _warnings = [];
    private readonly SpectrumLoader _loader;
    private readonly FilmParts _parts;

    public FilmReader(string folder, SpectrumShelf shelf, FaultList faults)
    {
        _faults = faults;
        _parts = new(faults);
        _loader = new(folder, shelf, faults, _warnings);
    }

    /// <summary>Every scalar of the tree that names a spectrum file.</summary>
    public IReadOnlyList<ScalarNode> FileNames => _loader.FileNames;

    /// <summary>The case; null where the faults say why.</summary>
    public FilmCase? Read(Node tree, string defaultTitle)
    {
        if (tree is not MappingNode mapping)
        {
            _faults.Add(tree.Place, $"The file holds {tree.Described}; keys with values are due, such as title: and layers:.");
            return null;
        }

        var root = new Section(mapping, "", _faults);
        string title = root.OptionalText("title") ?? defaultTitle;
        var backlight = root.Inner("backlight", isRequired: true) is { } light ? BacklightSection.Read(light, _loader) : null;
        Host(root);
        var lots = Lots(root, backlight);
        var cavity = root.Has("cavity") && root.Find("cavity") is not (MappingNode or ScalarNode { IsNull: true })
            ? Faulty(root, "cavity") : CavitySection.Read(root.Inner("cavity"), _loader);
        var layers = Layers(root);
        var panel = root.Inner("panel") is { } filters ? PanelSection.Read(filters, _loader) : null;
        bool hasPanel = root.Find("panel") is MappingNode;
        var target = root.Inner("target") is { } aim ? TargetSection.Read(aim, _parts, hasPanel, backlight?.Incidence.Kind) : null;
        var observer = root.Find("observer") is { } named ? _loader.Observer(named, "observer") : StandardObserver.Cie1931;
        var sheet = Sheet(root);
        var paths = BeerLambert(root);
        root.Close();
        if (_faults.Any || backlight is null || cavity is null || observer is null)
            return null;
        return new()
        {
            Film = new()
            {
                Title = title,
                Backlight = backlight,
                Cavity = cavity,
                Layers = layers,
                Lots = lots,
                Sheet = sheet,
                BeerLambertPaths = paths,
            },
            Panel = panel,
            Target = target,
            Observer = observer,
            Warnings = _warnings,
        };
    }

    private static Cavity? Faulty(Section root, string key)
    {
        root.Inner(key);
        return null;
    }

    private void Host(Section root)
    {
        if (root.Inner("host", isRequired: true) is not { } host)
            return;
        _parts.HostRefractiveIndex = host.RequiredNumber("refractive_index", NumberRule.RefractiveIndex);
        _parts.HostDensityGPerMl = host.OptionalNumber("density_g_per_ml", NumberRule.DensityGPerMl);
        host.Close();
    }

    private List<DotLot> Lots(Section root, Backlight? backlight)
    {
        var readers = new List<LotSection>();
        var items = root.List("lots") ?? [];
        for (int i = 0; i < items.Count; i++)
        {
            if (root.SectionOf(items[i], $"lots[{i}]") is { } section)
                readers.Add(new(section, i, _loader));
        }

        foreach (var reader in readers.Where(reader => reader.Name.Length > 0))
        {
            if (_parts.LotNames.Contains(reader.Name))
                _faults.Add(reader.Place.Place, $"The lot name {Shown.Quoted(reader.Name)} stands twice in lots; names are unique.");
            else
                _parts.LotNames.Add(reader.Name);
        }

        var used = UsedLots(root);
        _parts.UsedLotNames.AddRange(_parts.LotNames.Where(used.Contains));
        _loader.SetLight([backlight?.Photons, .. readers.Where(reader => used.Contains(reader.Name)).Select(reader => reader.Emission)]);
        var lots = new List<DotLot>();
        foreach (var reader in readers)
        {
            if (reader.Lot(_loader) is not { } lot)
                continue;
            lots.Add(lot);
            _parts.Add(lot);
            if (used.Contains(lot.Name) && lot is { FilmYieldFactor: 1, FilmExtinctionFactor: 1, FilmEmissionShiftNm: 0 })
            {
                _warnings.Add(
                    $"Lot '{lot.Name}' is not calibrated: film_yield_factor, film_extinction_factor and film_emission_shift_nm are at their defaults, "
                    + "so the film is taken to act like the dilute sample.");
            }
        }

        return lots;
    }

    // A glance ahead: layers are read after the lots they name.
    private static HashSet<string> UsedLots(Section root)
    {
        static IEnumerable<Node> Items(Node? node) => (node as ListNode)?.Items ?? [];
        return [.. from layer in Items(root.Find("layers")).OfType<MappingNode>()
                   from dots in Items(layer.Find("dots")?.Value).OfType<MappingNode>()
                   select (dots.Find("lot")?.Value as ScalarNode)?.Text];
    }

    private List<Layer> Layers(Section root)
    {
        var layers = new List<Layer>();
        if (root.Required("layers") is not { } value)
            return layers;
        var items = root.List("layers");
        if (items is { Count: 0 })
            _faults.Add(value.Place, "layers is empty; at least one layer is required.");
        var names = new HashSet<string>(StringComparer.Ordinal);
        for (int i = 0; i < items?.Count; i++)
        {
            if (root.SectionOf(items[i], $"layers[{i}]") is not { } section)
                continue;
            if (LayerSection.Read(section, i, _parts, _loader) is { } layer)
                layers.Add(layer);
            if (section.Find("name") is ScalarNode { IsNull: false } name && !names.Add(name.Text))
                _faults.Add(name.Place, $"The layer name {Shown.Quoted(name.Text)} stands twice in layers; names are unique.");
        }

        return layers;
    }

    private static Sheet? Sheet(Section root)
    {
        if (root.Inner("sheet") is not { } section)
            return null;
        double widthMm = section.RequiredNumber("width_mm", NumberRule.AboveZero);
        double? heightMm = section.OptionalNumber("height_mm", NumberRule.AboveZero);
        section.Close();
        return new(widthMm, heightMm);
    }

    private static BeerLambertPaths? BeerLambert(Section root)
    {
        if (root.Inner("beer_lambert") is not { } section)
            return null;
        double? pump = section.OptionalNumber("pump_path", NumberRule.AtLeastOne), emission = section.OptionalNumber("emission_path", NumberRule.AtLeastOne);
        section.Close();
        return new(pump, emission);
    }
}
