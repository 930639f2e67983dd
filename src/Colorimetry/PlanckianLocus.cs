namespace Colorimetry;

/// <summary>Chromaticities of black bodies: CIE 1931 observer, c2 = 1.4388e-2 m K, sums over the 1 nm grid.</summary>
/// <remarks>Source: Planck's law; c2 as CIE 15:2018 fixes it for colour temperature.</remarks>
public static class PlanckianLocus
{
    /// <summary>Second radiation constant, m K.</summary>
    public const double C2MetreKelvin = 1.4388e-2;

    /// <summary>Chromaticity of a black body.</summary>
    /// <param name="kelvin">Temperature, K, from 500 (below it the sums underflow).</param>
    /// <exception cref="ArgumentOutOfRangeException">Colder than 500 K, or not a number.</exception>
    public static Chromaticity At(double kelvin)
    {
        if (!(kelvin >= 500))
            throw new ArgumentOutOfRangeException(nameof(kelvin), kelvin, "A black body needs at least 500 K here.");
        var (x, y, z, _, _, _) = Sums(1e6 / kelvin);
        return new(x / (x + y + z), y / (x + y + z));
    }

    /// <summary>Point and tangent in CIE 1960 uv against reciprocal temperature.</summary>
    /// <param name="mired">Reciprocal temperature, 10⁶/K.</param>
    internal static (double U, double V, double DuDmired, double DvDmired) TangentAt(double mired)
    {
        var (x, y, z, dx, dy, dz) = Sums(mired);
        // u = 4X/(X + 15Y + 3Z), v = 6Y/(X + 15Y + 3Z)
        double d = x + (15 * y) + (3 * z), dd = dx + (15 * dy) + (3 * dz);
        return (4 * x / d, 6 * y / d, 4 * ((dx * d) - (x * dd)) / (d * d), 6 * ((dy * d) - (y * dd)) / (d * d));
    }

    private static (double X, double Y, double Z, double Dx, double Dy, double Dz) Sums(double mired)
    {
        var observer = StandardObserver.Cie1931;
        double x = 0, y = 0, z = 0, dx = 0, dy = 0, dz = 0;
        for (int i = 0; i < WavelengthGrid.Count; i++)
        {
            double metre = WavelengthGrid.NmAt(i) * 1e-9;
            double slope = C2MetreKelvin * 1e-6 / metre;
            double grown = Math.Exp(slope * mired);
            // Relative to 560 nm: chromaticity does not see the scale, and the numbers stay of ordinary size.
            double power = Math.Pow(560e-9 / metre, 5) / (grown - 1);
            double derivative = -power * slope * grown / (grown - 1);
            x += power * observer.XBar[i];
            y += power * observer.YBar[i];
            z += power * observer.ZBar[i];
            dx += derivative * observer.XBar[i];
            dy += derivative * observer.YBar[i];
            dz += derivative * observer.ZBar[i];
        }

        return (x, y, z, dx, dy, dz);
    }
}
