using Colorimetry;

namespace FilmOptics;

/// <summary>What is known of a dot.</summary>
public sealed record DotDescription
{
    /// <summary>Material of the core.</summary>
    public required Semiconductor Material { get; init; }

    /// <summary>Diameter of the core, nm; null where the peak is known instead.</summary>
    public double? DiameterNm { get; init; }

    /// <summary>First absorption peak, nm; null where the diameter is known instead.</summary>
    public double? PeakNm { get; init; }

    /// <summary>Material of the shell; null for a bare core.</summary>
    public Semiconductor? Shell { get; init; }

    /// <summary>Thickness of the shell, nm.</summary>
    public double ShellNm { get; init; }

    /// <summary>Height of the matrix above the core's band edges, eV.</summary>
    public required double BarrierEv { get; init; }

    /// <summary>Standard deviation of the diameter ÷ the diameter; null where it is not known.</summary>
    public double? SizeSpreadShare { get; init; }

    /// <summary>Temperature, K; null for 300 K, where the constants hold.</summary>
    public double? TemperatureKelvin { get; init; }

    /// <summary>FWHM of a single dot, meV.</summary>
    public double HomogeneousFwhmMev { get; init; }
}

/// <summary>Size, band edge, absorption and line of a dot, by every way that holds for it.</summary>
/// <param name="Material">Material of the core.</param>
/// <param name="Curves">What the published curves say, where one holds.</param>
/// <param name="Models">What effective mass says: behind hard walls, behind a finite barrier, with the shell.</param>
/// <param name="Extinction350PerMPerCm">Decadic molar extinction at 350 nm, CdSe alone.</param>
/// <param name="SpreadFwhmMev">FWHM by the spread of sizes, meV.</param>
/// <param name="TotalFwhmMev">FWHM in all, meV.</param>
/// <param name="TotalFwhmNm">FWHM in all, nm.</param>
/// <param name="HeatShiftNm">Shift of the first absorption peak from 300 K to the temperature asked for, nm; null where none was, or Varshni's constants are not known.</param>
/// <param name="Warnings">What not to trust.</param>
/// <param name="Sources">Where the figures come from.</param>
public sealed record DotEstimate(
    Semiconductor Material,
    IReadOnlyList<DotEstimate.Curve> Curves,
    IReadOnlyList<DotEstimate.Model> Models,
    double? Extinction350PerMPerCm,
    double? SpreadFwhmMev,
    double? TotalFwhmMev,
    double? TotalFwhmNm,
    double? HeatShiftNm,
    IReadOnlyList<string> Warnings,
    IReadOnlyList<string> Sources)
{
    // Where effective mass and curve differ by more, the difference is worth a word.
    private const double TooBlueEv = 0.05;

    /// <summary>A published curve at the dot.</summary>
    /// <param name="Name">Who published it.</param>
    /// <param name="DiameterNm">Diameter, nm.</param>
    /// <param name="PeakNm">First absorption peak, nm.</param>
    /// <param name="ExtinctionPerMPerCm">Decadic molar extinction there.</param>
    public sealed record Curve(string Name, double DiameterNm, double PeakNm, double ExtinctionPerMPerCm);

    /// <summary>A model at the dot.</summary>
    /// <param name="Name">Which.</param>
    /// <param name="DiameterNm">Diameter of the core, nm.</param>
    /// <param name="BandEdgeEv">Band edge, eV.</param>
    public sealed record Model(string Name, double DiameterNm, double BandEdgeEv);

    /// <summary>Everything that can be said.</summary>
    /// <exception cref="InputException">Neither curve nor model holds, or an offset of the shell is not known.</exception>
    public static DotEstimate Of(DotDescription dot)
    {
        ArgumentNullException.ThrowIfNull(dot);
        List<string> warnings = [], sources = [$"{dot.Material.Name}: {dot.Material.Source}."];
        List<Curve> curves = [];
        foreach (var curve in SizingCurve.Of(dot.Material.Name))
        {
            double? peakNm = dot.PeakNm ?? curve.PeakNm(dot.DiameterNm!.Value);
            if (peakNm is { } peak && curve.Holds(peak))
            {
                curves.Add(new(curve.Name, curve.DiameterNm(peak), peak, curve.ExtinctionPerMPerCm(peak)));
                sources.Add($"Sizing curve {curve.Name}: {curve.Source}.");
            }
            else
            {
                warnings.Add(FormattableString.Invariant($"The sizing curve {curve.Name} of {dot.Material.Name} holds from {curve.LowPeakNm} to {curve.HighPeakNm} nm, which is {curve.DiameterNm(curve.LowPeakNm):0.0} to {curve.DiameterNm(curve.HighPeakNm):0.0} nm across; this dot lies outside."));
            }
        }

        double diameterNm = dot.DiameterNm
            ?? (curves.Count > 0 ? curves[0].DiameterNm : 2 * EffectiveMass.RadiusNm(dot.Material, EffectiveMass.PhotonEvNm / dot.PeakNm!.Value))
            ?? throw new InputException(new InputFault("--peak-nm", null, null, FormattableString.Invariant(
                $"no {dot.Material.Name} dot has its first absorption peak at {dot.PeakNm} nm: the bulk's gap of {dot.Material.GapEv} eV is at {EffectiveMass.PhotonEvNm / dot.Material.GapEv:0} nm.")));
        var models = ModelsOf(dot, diameterNm, warnings);
        if (curves.Count > 0 && models[0].BandEdgeEv - (EffectiveMass.PhotonEvNm / curves[0].PeakNm) is > TooBlueEv and var excess)
            warnings.Add(FormattableString.Invariant($"Effective mass behind hard walls puts the band edge {excess:0.00} eV too blue here: trust the sizing curve."));
        if (curves.Count == 0)
            warnings.Add("Without a sizing curve the size is effective mass alone, which is too blue for small dots (measured gaps rise more slowly than 1/d²): check against a micrograph.");

        var (spread, total, totalNm) = Line(dot, diameterNm, curves, models);
        bool isCdSe = dot.Material.Name == "CdSe";
        if (isCdSe)
            sources.Add("350 nm: Leatherdale, Woo, Mikulec and Bawendi, J. Phys. Chem. B 106, 7619 (2002).");
        return new(
            dot.Material,
            curves,
            models,
            isCdSe ? DotAbsorption.ExtinctionPerMPerCm(DotAbsorption.CdSe350CrossSectionCm2(diameterNm / 2)) : null,
            spread,
            total,
            totalNm,
            HeatShift(dot, curves.Count > 0 ? curves[0].PeakNm : EffectiveMass.PhotonEvNm / models[0].BandEdgeEv, warnings),
            warnings,
            sources);
    }

    private static List<Model> ModelsOf(DotDescription dot, double diameterNm, List<string> warnings)
    {
        List<Model> models = [new("effective mass, hard walls", diameterNm, EffectiveMass.BandEdgeEv(dot.Material, diameterNm / 2))];
        if (EffectiveMass.BandEdgeEv(dot.Material, diameterNm / 2, null, 0, dot.BarrierEv) is { } finite)
            models.Add(new(FormattableString.Invariant($"effective mass, barrier of {dot.BarrierEv} eV"), diameterNm, finite));
        else
            warnings.Add(FormattableString.Invariant($"A barrier of {dot.BarrierEv} eV does not hold both carriers in {diameterNm:0.00} nm."));
        if (dot.Shell is not { } shell)
            return models;
        if (EffectiveMass.BandEdgeEv(dot.Material, diameterNm / 2, shell, dot.ShellNm, dot.BarrierEv) is { } covered)
            models.Add(new(FormattableString.Invariant($"the same with {dot.ShellNm} nm of {shell.Name}"), diameterNm, covered));
        else
            warnings.Add($"The shell of {shell.Name} does not hold both carriers.");
        return models;
    }

    // Confinement hardly depends on the temperature: the dot's edge follows the bulk's gap.
    private static double? HeatShift(DotDescription dot, double peakNm, List<string> warnings)
    {
        const double RoomKelvin = 300;
        if (dot.TemperatureKelvin is not { } kelvin)
            return null;
        if (dot.Material.Varshni is not { } law)
        {
            warnings.Add($"Varshni's constants of {dot.Material.Name} are not known here: no shift with the temperature.");
            return null;
        }

        double change = DotLine.VarshniEv(0, law.AlphaEvPerKelvin, law.BetaKelvin, kelvin) - DotLine.VarshniEv(0, law.AlphaEvPerKelvin, law.BetaKelvin, RoomKelvin);
        return (EffectiveMass.PhotonEvNm / ((EffectiveMass.PhotonEvNm / peakNm) + change)) - peakNm;
    }

    // The slope of the curve where there is one: effective mass would make the line too wide.
    private static (double? Spread, double? Total, double? TotalNm) Line(DotDescription dot, double diameterNm, List<Curve> curves, List<Model> models)
    {
        if (dot.SizeSpreadShare is not { } share)
            return (null, null, null);
        double slope, peakNm;
        if (curves.Count > 0)
        {
            peakNm = curves[0].PeakNm;
            slope = SizingCurve.Of(dot.Material.Name).First(curve => curve.Name == curves[0].Name).SlopeMevPerNm(peakNm);
        }
        else
        {
            const double step = 1e-3;
            peakNm = EffectiveMass.PhotonEvNm / models[0].BandEdgeEv;
            slope = 1000 * (EffectiveMass.BandEdgeEv(dot.Material, (diameterNm + step) / 2) - EffectiveMass.BandEdgeEv(dot.Material, (diameterNm - step) / 2)) / (2 * step);
        }

        double spread = DotLine.SpreadFwhmMev(slope, diameterNm, share), total = DotLine.TotalFwhmMev(dot.HomogeneousFwhmMev, spread);
        return (spread, total, DotLine.FwhmNm(total, peakNm));
    }
}
