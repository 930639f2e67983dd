namespace FilmOptics.Tests.PhotonTracing;

/// <summary>Compares estimates within their combined standard errors.</summary>
internal static class Agreement
{
    public const double AllowedErrors = 4;

    public static void AssertWithin(double expected, double expectedError, double found, double foundError, string what, double allowedErrors = AllowedErrors)
    {
        double error = Math.Sqrt((expectedError * expectedError) + (foundError * foundError));
        Assert.True(
            Math.Abs(found - expected) <= allowedErrors * error,
            $"{what}: {found:g8} ± {foundError:g2} against {expected:g8} ± {expectedError:g2}, {(found - expected) / error:+0.0;-0.0} combined standard errors.");
    }

    /// <summary>χ² of bins against the mean and spread that χ² has, at a false alarm in 30 000.</summary>
    public static void AssertChiSquared(double chiSquared, int bins, string what)
    {
        // Wilson and Hilferty 1931: the cube root of χ²/n is close to normal, mean 1 − 2/9n, variance 2/9n.
        double spread = 2.0 / (9 * bins);
        double deviations = (Math.Cbrt(chiSquared / bins) - (1 - spread)) / Math.Sqrt(spread);
        Assert.True(
            Math.Abs(deviations) <= AllowedErrors,
            $"{what}: χ² {chiSquared:g5} over {bins} bins is {deviations:+0.0;-0.0} standard deviations from what chance gives.");
    }
}
