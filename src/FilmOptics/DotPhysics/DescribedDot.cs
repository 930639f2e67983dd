using Colorimetry;

namespace FilmOptics;

/// <summary>Absorbance and emission of a lot computed from what its dots are: a stand-in until the lot is measured.</summary>
/// <remarks>
/// The first transition is a Gaussian in energy at the band edge, as wide as one dot and the spread of sizes make it, as high as the published
/// extinction; above it rises the absorption of the material itself, whose coefficient per volume does not depend on the size. The
/// emission is the same Gaussian behind the Stokes shift.
/// </remarks>
public sealed record DescribedDot
{
    // Higher transitions set in this far above the first, and this softly: from memory, read off typical spectra.
    private const double OnsetEv = 0.16, OnsetSoftnessEv = 0.07;

    // First transition ÷ the material's own coefficient at 450 nm where no extinction is published (InP): from memory.
    private const double FirstPeakShare = 0.3;

    /// <summary>Materials whose absolute absorption is known here.</summary>
    public static IReadOnlyList<string> Materials => ["CdSe", "InP"];

    /// <summary>Material of the core, one of <see cref="Materials"/>.</summary>
    public required Semiconductor Material { get; init; }

    /// <summary>Diameter of the core, nm.</summary>
    public required double CoreDiameterNm { get; init; }

    /// <summary>Standard deviation of the diameter ÷ the diameter.</summary>
    public required double SizeSpreadShare { get; init; }

    /// <summary>FWHM of a single dot's line, meV.</summary>
    public required double HomogeneousFwhmMev { get; init; }

    /// <summary>Emission peak less first absorption peak, nm.</summary>
    public required double StokesShiftNm { get; init; }

    /// <summary>Core's share of the weighed mass with shell and ligand.</summary>
    public required double CoreMassShare { get; init; }

    /// <summary>Material of the shell; null for a bare core.</summary>
    public Semiconductor? Shell { get; init; }

    /// <summary>Thickness of the shell, nm.</summary>
    public double ShellNm { get; init; }

    /// <summary>The dot's size, band edge and width.</summary>
    /// <exception cref="InputException">No model holds for it.</exception>
    public DotEstimate Estimate() => DotEstimate.Of(new DotDescription
    {
        Material = Material,
        DiameterNm = CoreDiameterNm,
        Shell = Shell,
        ShellNm = ShellNm,
        BarrierEv = DefaultBarrierEv,
        SizeSpreadShare = SizeSpreadShare,
        HomogeneousFwhmMev = HomogeneousFwhmMev,
    });

    /// <summary>Height of the matrix where nothing else is known, eV (from memory).</summary>
    public const double DefaultBarrierEv = 4;

    /// <summary>First absorption peak, nm: by the sizing curve, else by the finite well; a shell's shift comes from the wells with and without it.</summary>
    /// <exception cref="InputException">The well holds no carrier, or the line lies outside the grid.</exception>
    public double FirstPeakNm()
    {
        var dot = Estimate();
        var wells = dot.Models.Skip(1).ToArray();
        if (wells.Length < (Shell is null ? 1 : 2))
            throw Fault(FormattableString.Invariant($"core_diameter_nm {CoreDiameterNm}: {string.Join(' ', dot.Warnings)}"));
        double edgeEv = dot.Curves.Count > 0 ? EffectiveMass.PhotonEvNm / dot.Curves[0].PeakNm : wells[0].BandEdgeEv;
        if (Shell is not null)
            edgeEv += wells[1].BandEdgeEv - wells[0].BandEdgeEv;
        return EffectiveMass.PhotonEvNm / edgeEv;
    }

    /// <summary>Decadic absorbance per cm at 1 mg/mL of dots with shell and ligand.</summary>
    public Spectrum<AbsorbancePerCm> Absorbance()
    {
        var dot = Estimate();
        double peakNm = FirstPeakNm(), peakEv = EffectiveMass.PhotonEvNm / peakNm, sigmaEv = dot.TotalFwhmMev!.Value / 1000 / DotLine.FwhmPerDeviation;
        double first = FirstCoefficientPerCm(dot, sigmaEv);
        return Spectrum.Sampled<AbsorbancePerCm>(
            nm =>
            {
                double ev = EffectiveMass.PhotonEvNm / nm, distance = (ev - peakEv) / sigmaEv;
                double soft = Math.Sqrt((sigmaEv * sigmaEv) + (OnsetSoftnessEv * OnsetSoftnessEv));
                double onset = 1 / (1 + Math.Exp(-(ev - peakEv - OnsetEv) / (0.6 * soft)));
                double perCm = (first * Math.Exp(-distance * distance / 2)) + (onset * BulkPerCm(nm));
                return DotAbsorption.AbsorbancePerCmPerMgPerMl(perCm, Material.DensityGPerMl, CoreMassShare);
            },
            $"computed from {Material.Name} of {FormattableString.Invariant($"{CoreDiameterNm}")} nm");
    }

    /// <summary>Emission, photons per emitted photon in each bin.</summary>
    /// <param name="shiftNm">Shift from dilute to film, nm.</param>
    public Spectrum<PhotonPerNm> Emission(double shiftNm)
    {
        double peakNm = FirstPeakNm() + StokesShiftNm + shiftNm, peakEv = EffectiveMass.PhotonEvNm / peakNm;
        double sigmaEv = Estimate().TotalFwhmMev!.Value / 1000 / DotLine.FwhmPerDeviation;
        double reach = 4 * sigmaEv;
        if (EffectiveMass.PhotonEvNm / (peakEv + reach) < WavelengthGrid.FirstNm || EffectiveMass.PhotonEvNm / (peakEv - reach) > WavelengthGrid.LastNm)
            throw Fault(FormattableString.Invariant($"its emission at {peakNm:0} nm does not lie within {WavelengthGrid.FirstNm} to {WavelengthGrid.LastNm} nm."));

        // Photons per nm are photons per eV times |dE/dλ|, which goes with E².
        return Spectrum.Sampled<PhotonPerNm>(
            nm =>
            {
                double ev = EffectiveMass.PhotonEvNm / nm, distance = (ev - peakEv) / sigmaEv;
                return ev * ev * Math.Exp(-distance * distance / 2);
            },
            $"computed from {Material.Name} of {FormattableString.Invariant($"{CoreDiameterNm}")} nm").NormalisedToUnitSum();
    }

    // Coefficient of the core's volume at the first peak, 1/cm, base e. Jasieniak's extinction is normalised to a half-width of 60 meV.
    private double FirstCoefficientPerCm(DotEstimate dot, double sigmaEv)
    {
        const double normalHalfWidthEv = 0.06;
        if (dot.Curves.Count == 0)
            return FirstPeakShare * BulkPerCm(450);
        var curve = dot.Curves[^1];
        double crossSectionCm2 = curve.ExtinctionPerMPerCm / DotAbsorption.ExtinctionPerMPerCm(1);
        double halfWidthEv = sigmaEv * DotLine.FwhmPerDeviation / 2;
        return DotAbsorption.IntrinsicPerCm(crossSectionCm2, CoreDiameterNm / 2) * normalHalfWidthEv / halfWidthEv;
    }

    // The material's own coefficient in a host of n = 1.5, straight in the logarithm between known wavelengths and beyond them.
    private double BulkPerCm(double wavelengthNm)
    {
        // CdSe: local field of Ninomiya and Adachi's constants at 450 nm; Leatherdale's cross-section at 350 nm. InP: local field of Aspnes and Studna's constants.
        (double Nm, double PerCm)[] known = Material.Name == "InP"
            ? [(335.1, 2.63e5), (413.3, 8.22e4), (450, 5.54e4)]
            : [(350, 1.3133e5), (450, 9.10e4)];
        int i = 0;
        while (i + 2 < known.Length && wavelengthNm > known[i + 1].Nm)
            i++;
        double share = (wavelengthNm - known[i].Nm) / (known[i + 1].Nm - known[i].Nm);
        return known[i].PerCm * Math.Pow(known[i + 1].PerCm / known[i].PerCm, share);
    }

    private static InputException Fault(string message) => new(new InputFault("lot by description", null, null, message));
}
