using Colorimetry;

namespace FilmOptics;

/// <summary>Published curve between the first absorption peak of a dot and its diameter, with the molar extinction there.</summary>
public sealed class SizingCurve
{
    private readonly double[] _coefficients;
    private readonly Func<double, double, double> _extinction;

    private SizingCurve(string name, string material, double lowNm, double highNm, double[] coefficients, Func<double, double, double> extinction, string source)
    {
        (Name, Material, LowPeakNm, HighPeakNm) = (name, material, lowNm, highNm);
        (_coefficients, _extinction, Source) = (coefficients, extinction, source);
    }

    /// <summary>All curves.</summary>
    public static IReadOnlyList<SizingCurve> All { get; } =
    [
        new("Yu 2003", "CdSe", 450, 640, [41.57, -0.4277, 1.6242e-3, -2.6575e-6, 1.6122e-9], (_, d) => 5857 * Math.Pow(d, 2.65),
            "Yu, Qu, Guo and Peng, Chem. Mater. 15, 2854 (2003)"),
        new("Jasieniak 2009", "CdSe", 450, 657, [59.60816, -0.54736, 1.8873e-3, -2.85743e-6, 1.62974e-9], (peak, _) => 155507 + (6.67054e13 * Math.Exp(-EffectiveMass.PhotonEvNm / peak / 0.10551)),
            "Jasieniak, Smith, van Embden, Mulvaney and Califano, J. Phys. Chem. C 113, 19468 (2009), 2 to 8 nm; extinction at a half-width of 0.06 eV"),
        new("Yu 2003", "CdTe", 550, 650, [-194.84, 1.0064, -1.7147e-3, 9.8127e-7], (_, d) => 10043 * Math.Pow(d, 2.12),
            "Yu, Qu, Guo and Peng, Chem. Mater. 15, 2854 (2003)"),
        new("Yu 2003", "CdS", 375, 450, [13.29, -9.2352e-2, 1.9557e-4, -6.6521e-8], (_, d) => 21536 * Math.Pow(d, 2.3),
            "Yu, Qu, Guo and Peng, Chem. Mater. 15, 2854 (2003); extinction from memory"),
    ];

    /// <summary>Who published it.</summary>
    public string Name { get; }

    /// <summary>Formula of the material.</summary>
    public string Material { get; }

    /// <summary>Shortest peak it holds for, nm.</summary>
    public double LowPeakNm { get; }

    /// <summary>Longest peak it holds for, nm.</summary>
    public double HighPeakNm { get; }

    /// <summary>Where it stands.</summary>
    public string Source { get; }

    /// <summary>The curves of a material; none for most.</summary>
    public static IEnumerable<SizingCurve> Of(string material) => All.Where(curve => string.Equals(curve.Material, material, StringComparison.OrdinalIgnoreCase));

    /// <summary>Whether a peak lies within the curve's range.</summary>
    /// <param name="peakNm">First absorption peak, nm.</param>
    public bool Holds(double peakNm) => peakNm >= LowPeakNm && peakNm <= HighPeakNm;

    /// <summary>Diameter, nm.</summary>
    /// <param name="peakNm">First absorption peak, nm.</param>
    /// <exception cref="InputException">The peak lies outside the range of the curve.</exception>
    public double DiameterNm(double peakNm)
    {
        RequireHeld(peakNm);
        double sum = 0;
        for (int i = _coefficients.Length - 1; i >= 0; i--)
            sum = (sum * peakNm) + _coefficients[i];
        return sum;
    }

    /// <summary>Decadic molar extinction at the peak, 1/(M cm).</summary>
    /// <param name="peakNm">First absorption peak, nm.</param>
    /// <exception cref="InputException">The peak lies outside the range of the curve.</exception>
    public double ExtinctionPerMPerCm(double peakNm) => _extinction(peakNm, DiameterNm(peakNm));

    /// <summary>First absorption peak of a diameter, nm; null where it lies outside the range.</summary>
    /// <param name="diameterNm">Diameter, nm.</param>
    public double? PeakNm(double diameterNm)
    {
        double low = LowPeakNm, high = HighPeakNm;
        if (!(diameterNm >= DiameterNm(low) && diameterNm <= DiameterNm(high)))
            return null;
        while (high - low > 1e-9)
        {
            double middle = (low + high) / 2;
            (low, high) = DiameterNm(middle) < diameterNm ? (middle, high) : (low, middle);
        }

        return (low + high) / 2;
    }

    /// <summary>Slope of the band edge over the diameter, meV/nm, below 0.</summary>
    /// <param name="peakNm">First absorption peak, nm; its neighbourhood of 0.1 nm has to lie within the range too.</param>
    public double SlopeMevPerNm(double peakNm)
    {
        double below = Math.Max(LowPeakNm, peakNm - 0.1), above = Math.Min(HighPeakNm, peakNm + 0.1);
        return 1000 * EffectiveMass.PhotonEvNm * ((1 / above) - (1 / below)) / (DiameterNm(above) - DiameterNm(below));
    }

    private void RequireHeld(double peakNm)
    {
        if (!Holds(peakNm))
        {
            throw new InputException(new InputFault($"sizing curve {Name} of {Material}", null, null, FormattableString.Invariant(
                $"a first absorption peak of {peakNm:0.#} nm lies outside its range, {LowPeakNm} to {HighPeakNm} nm; outside it the polynomial means nothing.")));
        }
    }
}
