using System.Globalization;
using Colorimetry;

namespace FilmOptics;

/// <summary>Where one photon ends in the one-box cavity, per wavelength: closed forms of the bounces between the outer reflectors.</summary>
/// <param name="Out">Leaves above.</param>
/// <param name="Absorbed">Absorbed in the layer.</param>
/// <param name="LostAbove">Absorbed by the sheets above.</param>
/// <param name="LostBelow">Absorbed by the reflector below.</param>
internal readonly record struct CavityPass(double Out, double Absorbed, double LostAbove, double LostBelow)
{
    // Below this depth 1 − exp(−x) loses digits; the series is exact to rounding.
    private const double SeriesLimit = 0.02;

    /// <summary>Fates of a photon that falls on the layer from outside.</summary>
    /// <param name="depth">Optical depth along the mean path.</param>
    /// <param name="belowReflectance">R_b.</param>
    /// <param name="aboveReflectance">R_t.</param>
    /// <param name="aboveAbsorptance">A_t.</param>
    /// <param name="wavelengthIndex">For the message of a refusal.</param>
    public static (CavityPass FromBelow, CavityPass FromAbove) Outside(
        double depth, double belowReflectance, double aboveReflectance, double aboveAbsorptance, int wavelengthIndex)
    {
        var (transmitted, absorbed, _, _) = Layer(depth);
        double d = Denominator(transmitted, absorbed, belowReflectance, aboveReflectance, wavelengthIndex);
        double passed = 1 - aboveReflectance - aboveAbsorptance;
        double back = belowReflectance * transmitted * transmitted;
        return (
            new(transmitted * passed / d,
                absorbed * (1 + (aboveReflectance * transmitted)) / d,
                transmitted * aboveAbsorptance / d,
                aboveReflectance * transmitted * transmitted * (1 - belowReflectance) / d),
            new(back * passed / d,
                absorbed * (1 + (belowReflectance * transmitted)) / d,
                back * aboveAbsorptance / d,
                transmitted * (1 - belowReflectance) / d));
    }

    /// <summary>Fates of a photon emitted evenly in depth, half up and half down.</summary>
    /// <param name="depth">Optical depth along the mean path.</param>
    /// <param name="belowReflectance">R_b.</param>
    /// <param name="aboveReflectance">R_t.</param>
    /// <param name="aboveAbsorptance">A_t.</param>
    /// <param name="wavelengthIndex">For the message of a refusal.</param>
    public static CavityPass Inside(
        double depth, double belowReflectance, double aboveReflectance, double aboveAbsorptance, int wavelengthIndex)
    {
        var (transmitted, absorbed, escaped, kept) = Layer(depth);
        double d = Denominator(transmitted, absorbed, belowReflectance, aboveReflectance, wavelengthIndex);
        double up = escaped / 2 * (1 + (belowReflectance * transmitted)) / d;
        double down = escaped / 2 * (1 + (aboveReflectance * transmitted)) / d;
        return new(
            up * (1 - aboveReflectance - aboveAbsorptance),
            kept + (absorbed * ((aboveReflectance * up) + (belowReflectance * down))),
            up * aboveAbsorptance,
            down * (1 - belowReflectance));
    }

    // T, A = 1 − T, T₁ = A/x and 1 − T₁.
    private static (double Transmitted, double Absorbed, double Escaped, double Kept) Layer(double x)
    {
        if (x < SeriesLimit)
        {
            double kept = x / 2 * (1 - (x / 3 * (1 - (x / 4 * (1 - (x / 5 * (1 - (x / 6 * (1 - (x / 7))))))))));
            double thin = x * (1 - kept);
            return (1 - thin, thin, 1 - kept, kept);
        }

        double transmitted = Math.Exp(-x), absorbed = 1 - transmitted;
        return (transmitted, absorbed, absorbed / x, 1 - (absorbed / x));
    }

    private static double Denominator(double transmitted, double absorbed, double below, double above, int wavelengthIndex)
    {
        // 1 − R_b R_t T² written so that it keeps its digits where all three are near 1.
        double lossBelow = 1 - below, lossAbove = 1 - above;
        double d = lossBelow + (below * (lossAbove + (above * absorbed * (1 + transmitted))));
        return d > 0
            ? d
            : throw new NumericalFailureException(string.Create(
                CultureInfo.InvariantCulture,
                $"At {WavelengthGrid.NmAt(wavelengthIndex)} nm light can never leave: both cavity reflectances are 1 and nothing absorbs."));
    }
}
