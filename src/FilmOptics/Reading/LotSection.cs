using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads the items of `lots`. Emission comes first: where there is light decides what absorbance has to cover.</summary>
internal sealed class LotSection
{
    private readonly Section _section;
    private readonly Node? _absorbance;
    private readonly DescribedDot? _described;
    private readonly double _yieldShare, _yieldFactor, _extinctionFactor, _shiftNm;
    private readonly double? _densityGPerMl, _cadmiumShare, _leadShare, _pricePerG, _stockWtPercent;
    private readonly double _scatteringPerMmPerMgPerMl;

    public LotSection(Section section, int index, SpectrumLoader loader)
    {
        _section = section;
        Name = section.RequiredText("name") ?? "";
        section.Path = Name.Length > 0 ? $"lots[{Name}]" : $"lots[{index}]";
        _described = DescribedDotSection.Read(section, loader);
        _absorbance = section.Has("material") ? null : section.Required("absorbance");
        _yieldShare = section.RequiredNumber("quantum_yield", NumberRule.Share);
        _yieldFactor = section.Number("film_yield_factor", NumberRule.AboveZero, 1);
        _extinctionFactor = section.Number("film_extinction_factor", NumberRule.AboveZero, 1);
        _shiftNm = section.Number("film_emission_shift_nm", NumberRule.ShiftNm, 0);
        if (_yieldShare * _yieldFactor > 1 + 1e-12)
        {
            section.Fault("film_yield_factor",
                $"{section.Path}: quantum_yield {Shown.Number(_yieldShare)} times film_yield_factor {Shown.Number(_yieldFactor)} "
                + $"is {Shown.Number(_yieldShare * _yieldFactor)}; at most 1 is allowed.");
        }

        _densityGPerMl = section.OptionalNumber("density_g_per_ml", NumberRule.DensityGPerMl);
        _cadmiumShare = section.OptionalNumber("cadmium_mass_fraction", NumberRule.Share);
        _leadShare = section.OptionalNumber("lead_mass_fraction", NumberRule.Share);
        double heavyShare = (_cadmiumShare ?? 0) + (_leadShare ?? 0);
        if (heavyShare > 1)
        {
            section.Fault("lead_mass_fraction",
                $"{section.Path}: cadmium_mass_fraction and lead_mass_fraction sum to {Shown.Number(heavyShare)}; at most 1 is allowed.");
        }

        _pricePerG = section.OptionalNumber("price_per_g", NumberRule.AtLeastZero);
        _stockWtPercent = section.OptionalNumber("stock_wt_percent", NumberRule.StockWtPercent);
        _scatteringPerMmPerMgPerMl = section.Number("scattering_per_mm_per_mg_per_ml", NumberRule.AtLeastZero, 0);
        Emission = section.Has("material") ? DescribedEmission()
            : section.Required("emission") is { } emission
            ? loader.Light(emission, section.PathOf("emission"), SpectrumKind.Emission, double.IsFinite(_shiftNm) ? _shiftNm : 0)
            : null;
        section.Close();
    }

    public string Name { get; }

    public Node Place => _section.Find("name")!;

    public Spectrum<PhotonPerNm>? Emission { get; }

    /// <summary>The lot, or null after a fault.</summary>
    public DotLot? Lot(SpectrumLoader loader)
    {
        var absorbance = _described is not null ? DescribedAbsorbance()
            : _absorbance is null
            ? null
            : loader.Spectrum<AbsorbancePerCm>(_absorbance, _section.PathOf("absorbance"), SpectrumKind.Absorbance);
        if (absorbance is null || Emission is null)
            return null;
        return new()
        {
            Name = Name,
            Absorbance = absorbance,
            Emission = Emission,
            QuantumYieldShare = _yieldShare,
            FilmYieldFactor = _yieldFactor,
            FilmExtinctionFactor = _extinctionFactor,
            FilmEmissionShiftNm = _shiftNm,
            DensityGPerMl = _densityGPerMl,
            CadmiumMassShare = _cadmiumShare,
            LeadMassShare = _leadShare,
            PricePerG = _pricePerG,
            StockWtPercent = _stockWtPercent,
            ScatteringPerMmPerMgPerMl = _scatteringPerMmPerMgPerMl,
        };
    }

    private Spectrum<PhotonPerNm>? DescribedEmission() =>
        _described is null || double.IsNaN(_shiftNm) ? null : DescribedDotSection.Computed(_section, () => _described.Emission(_shiftNm));

    private Spectrum<AbsorbancePerCm>? DescribedAbsorbance() => DescribedDotSection.Computed(_section, () => _described!.Absorbance());
}
