namespace Colorimetry;

/// <summary>When the steps of a table count as even.</summary>
internal static class EvenSteps
{
    /// <summary>Two steps may differ by this and count as equal: instruments print wavelengths to two or three decimals, nm.</summary>
    public const double ToleranceNm = 0.002;

    /// <summary>The step, if all are equal; null otherwise.</summary>
    /// <param name="wavelengthsNm">At least two, rising.</param>
    public static double? Of(ReadOnlySpan<double> wavelengthsNm)
    {
        double step = (wavelengthsNm[^1] - wavelengthsNm[0]) / (wavelengthsNm.Length - 1);
        for (int i = 0; i < wavelengthsNm.Length; i++)
        {
            if (Math.Abs(wavelengthsNm[i] - (wavelengthsNm[0] + (i * step))) > ToleranceNm)
                return null;
        }

        return step;
    }
}
