using System.Numerics;

namespace Colorimetry;

/// <summary>CIE tristimulus values.</summary>
/// <param name="X">X.</param>
/// <param name="Y">Y, in lumens for light in watts: k = 683 lm/W.</param>
/// <param name="Z">Z.</param>
/// <remarks>Source: CIE 15:2018; plain sums over the 1 nm grid, 360 to 830 nm.</remarks>
public readonly record struct Tristimulus(double X, double Y, double Z)
{
    /// <summary>Whether there is any light to have a chromaticity.</summary>
    public bool HasColour => X + Y + Z > 0;

    /// <summary>Chromaticity.</summary>
    /// <exception cref="InvalidOperationException">There is no light; see <see cref="HasColour"/>.</exception>
    public Chromaticity Chromaticity => HasColour
        ? new(X / (X + Y + Z), Y / (X + Y + Z))
        : throw new InvalidOperationException("No light: a chromaticity is not defined.");

    /// <summary>Sum of two lights.</summary>
    public static Tristimulus operator +(Tristimulus left, Tristimulus right) =>
        new(left.X + right.X, left.Y + right.Y, left.Z + right.Z);

    /// <summary>A colour from its chromaticity and Y.</summary>
    public static Tristimulus From(Chromaticity chromaticity, double y) =>
        new(y * chromaticity.X / chromaticity.Y, y, y * (1 - chromaticity.X - chromaticity.Y) / chromaticity.Y);

    /// <summary>Tristimulus values of a light.</summary>
    /// <param name="light">W/nm; Y is then in lumens per whatever the watts are per.</param>
    /// <param name="observer">Colour-matching functions.</param>
    public static Tristimulus Of(Spectrum<WattPerNm> light, StandardObserver observer)
    {
        ArgumentNullException.ThrowIfNull(light);
        ArgumentNullException.ThrowIfNull(observer);
        return Of(light.Samples, observer);
    }

    /// <summary>The same for samples that need no spectrum around them, in the loop of a search.</summary>
    /// <param name="samples">471 samples, W/nm.</param>
    /// <param name="observer">Colour-matching functions.</param>
    internal static Tristimulus Of(ReadOnlySpan<double> samples, StandardObserver observer)
    {
        const double K = PhysicalConstants.MaximumLuminousEfficacyLumenPerWatt;
        return new(K * Dot(samples, observer.XBar), K * Dot(samples, observer.YBar), K * Dot(samples, observer.ZBar));
    }

    private static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        var sum = Vector<double>.Zero;
        int i = 0;
        for (; i <= a.Length - Vector<double>.Count; i += Vector<double>.Count)
            sum += new Vector<double>(a[i..]) * new Vector<double>(b[i..]);
        double total = Vector.Sum(sum);
        for (; i < a.Length; i++)
            total += a[i] * b[i];
        return total;
    }
}
