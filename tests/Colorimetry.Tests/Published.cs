using System.Globalization;

namespace Colorimetry.Tests;

/// <summary>Compares to half a unit in the last printed digit: the only tolerance that a printed number can justify.</summary>
internal static class Published
{
    public static void AssertMatches(string printed, double computed, string what)
    {
        int point = printed.IndexOf('.', StringComparison.Ordinal);
        int decimals = point < 0 ? 0 : printed.Length - 1 - point;
        double halfDigit = 0.5 * Math.Pow(10, -decimals);
        double published = double.Parse(printed, CultureInfo.InvariantCulture);
        // A hair for the rounding of a decimal number to a binary one.
        Assert.True(
            Math.Abs(computed - published) <= halfDigit * (1 + 1e-9),
            $"{what}: computed {computed:g9}, published {printed}, allowed {halfDigit:g1}.");
    }

    public static void AssertWithin(double expected, double computed, double tolerance, string what) => Assert.True(
        Math.Abs(computed - expected) <= tolerance, $"{what}: computed {computed:g9}, expected {expected:g9}, allowed {tolerance:g3}.");
}
