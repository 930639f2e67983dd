using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads a lot that says what its dots are in place of measured files.</summary>
internal static class DescribedDotSection
{
    private static readonly string[] Keys = ["core_diameter_nm", "size_spread_percent", "homogeneous_fwhm_mev", "stokes_shift_nm", "core_mass_fraction", "shell"];

    /// <summary>The dot; null where the lot has files, or after a fault.</summary>
    public static DescribedDot? Read(Section lot, SpectrumLoader loader)
    {
        if (!lot.Has("material"))
        {
            foreach (string key in Keys.Where(lot.Has))
                lot.Fault(key, $"{lot.PathOf(key)} describes dots; that needs material, one of {string.Join(", ", DescribedDot.Materials)}.");
            return null;
        }

        foreach (string key in (string[])["absorbance", "emission"])
        {
            if (lot.Has(key))
                lot.Fault(key, $"{lot.PathOf(key)} and {lot.PathOf("material")} exclude each other: a lot is measured or described.");
        }

        string? material = lot.Word("material", [.. DescribedDot.Materials]);
        double diameterNm = lot.RequiredNumber("core_diameter_nm", NumberRule.DotDiameterNm);
        double spreadPercent = lot.RequiredNumber("size_spread_percent", NumberRule.SpreadPercent);
        double homogeneousMev = lot.RequiredNumber("homogeneous_fwhm_mev", NumberRule.FwhmMev);
        double stokesNm = lot.RequiredNumber("stokes_shift_nm", NumberRule.StokesNm);
        double coreShare = lot.RequiredNumber("core_mass_fraction", NumberRule.ShareAboveZero);
        var (shell, shellNm) = Shell(lot);
        if (material is null || double.IsNaN(diameterNm + spreadPercent + homogeneousMev + stokesNm + coreShare + shellNm))
            return null;
        loader.Warn($"{lot.Path} is computed from its description, and no measurement: its absorbance is good to some 30 %, its line to the width that is given. Measure the lot before it decides anything.");
        if (shell is not null)
            loader.Warn($"{lot.PathOf("shell")}: its red shift is effective mass, which gives up to three times what is measured for thin shells.");
        return new()
        {
            Material = Semiconductor.Named(material),
            CoreDiameterNm = diameterNm,
            SizeSpreadShare = spreadPercent / 100,
            HomogeneousFwhmMev = homogeneousMev,
            StokesShiftNm = stokesNm,
            CoreMassShare = coreShare,
            Shell = shell is null ? null : Semiconductor.Named(shell),
            ShellNm = shellNm,
        };
    }

    /// <summary>A spectrum of the description; null with a fault where none can be computed.</summary>
    public static Spectrum<TUnit>? Computed<TUnit>(Section lot, Func<Spectrum<TUnit>> compute)
        where TUnit : struct, ISpectralUnit
    {
        try
        {
            return compute();
        }
        catch (InputException refused)
        {
            lot.Fault("core_diameter_nm", $"{lot.Path}: {refused.Faults[0].Message}");
            return null;
        }
    }

    private static (string? Material, double ThicknessNm) Shell(Section lot)
    {
        if (lot.Inner("shell") is not { } shell)
            return (null, 0);
        string? material = shell.Word("material", [.. Semiconductor.All.Where(known => known.ElectronLevelEv is not null).Select(known => known.Name)]);
        if (!shell.Has("material"))
            shell.Required("material");
        double thicknessNm = shell.RequiredNumber("thickness_nm", NumberRule.ShellNm);
        shell.Close();
        return material is null ? (null, double.NaN) : (material, thicknessNm);
    }
}
