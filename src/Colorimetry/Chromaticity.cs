namespace Colorimetry;

/// <summary>A chromaticity in the CIE 1931 xy diagram, with its coordinates in the two uniform diagrams.</summary>
/// <param name="X">CIE x.</param>
/// <param name="Y">CIE y.</param>
/// <remarks>Source of the transformations: CIE 15:2018 (1976 UCS) and, for CCT, the 1960 UCS of the same document.</remarks>
public readonly record struct Chromaticity(double X, double Y)
{
    /// <summary>u′ of the CIE 1976 UCS diagram; u of 1960 is the same number.</summary>
    public double UPrime => 4 * X / Denominator;

    /// <summary>v′ of the CIE 1976 UCS diagram.</summary>
    public double VPrime => 9 * Y / Denominator;

    /// <summary>v of the CIE 1960 UCS diagram, 2/3 of v′.</summary>
    public double V1960 => 6 * Y / Denominator;

    private double Denominator => (-2 * X) + (12 * Y) + 3;

    /// <summary>From CIE 1976 u′v′.</summary>
    public static Chromaticity FromUvPrime(double uPrime, double vPrime)
    {
        double denominator = (6 * uPrime) - (16 * vPrime) + 12;
        return new(9 * uPrime / denominator, 4 * vPrime / denominator);
    }

    /// <summary>Distance in xy.</summary>
    public double DistanceXyTo(Chromaticity other) => Math.Sqrt(((X - other.X) * (X - other.X)) + ((Y - other.Y) * (Y - other.Y)));

    /// <summary>Distance in u′v′.</summary>
    public double DistanceUvTo(Chromaticity other)
    {
        double du = UPrime - other.UPrime, dv = VPrime - other.VPrime;
        return Math.Sqrt((du * du) + (dv * dv));
    }
}
