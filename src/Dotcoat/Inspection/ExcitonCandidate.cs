namespace Dotcoat.Inspection;

/// <summary>A place in an absorbance curve that may be the first exciton: a maximum, or a shoulder on the band behind it.</summary>
/// <param name="AtNm">Wavelength, nm.</param>
/// <param name="IsShoulder">Whether it shows in the second derivative only.</param>
internal sealed record ExcitonCandidate(double AtNm, bool IsShoulder)
{
    private const double WindowNm = 8;
    private const int Most = 3;

    // What is fainter than this share of the curve's greatest value beyond 430 nm is noise on the tail, not an exciton.
    private const double FaintestShare = 0.02;
    private const double FromNm = 400;

    /// <summary>Candidates from the red end, at most three: the first of them is the likely first exciton.</summary>
    /// <remarks>
    /// At each sample a parabola is fitted by least squares over ±8 nm. A maximum is where its slope passes from rising to
    /// falling; a shoulder is where its curvature is most negative and bends the curve by over 2 % of its value within the
    /// window. This method is our own; common practice is to read the peak by eye.
    /// </remarks>
    public static IReadOnlyList<ExcitonCandidate> Of(ReadOnlySpan<double> wavelengthsNm, ReadOnlySpan<double> values)
    {
        double scale = 0;
        for (int i = 0; i < values.Length; i++)
        {
            if (wavelengthsNm[i] >= FromNm)
                scale = Math.Max(scale, values[i]);
        }

        var fits = new List<Fit>();
        for (int i = 0; i < values.Length; i++)
        {
            if (wavelengthsNm[i] >= FromNm && Fit.At(wavelengthsNm, values, i) is { } fit)
                fits.Add(fit);
        }

        var found = new List<ExcitonCandidate>();
        for (int i = fits.Count - 2; i > 0 && found.Count < Most; i--)
        {
            var (shorter, here, longer) = (fits[i - 1], fits[i], fits[i + 1]);
            if (here.Value < FaintestShare * scale || (found.Count > 0 && found[^1].AtNm - here.Nm < WindowNm))
                continue;
            if (here.Slope > 0 && longer.Slope <= 0)
            {
                double share = here.Slope / (here.Slope - longer.Slope);
                found.Add(new(here.Nm + (share * (longer.Nm - here.Nm)), IsShoulder: false));
            }
            else if (here.Slope < 0 && here.Curvature < shorter.Curvature && here.Curvature <= longer.Curvature
                && -here.Curvature * WindowNm * WindowNm / 2 > FaintestShare * here.Value && !MaximumWithin(fits, here.Nm))
            {
                found.Add(new(here.Nm, IsShoulder: true));
            }
        }

        return found;
    }

    // The curvature of a maximum is most negative beside it as well: that is no shoulder.
    private static bool MaximumWithin(List<Fit> fits, double nm)
    {
        for (int i = 1; i < fits.Count; i++)
        {
            if (Math.Abs(fits[i].Nm - nm) <= 2 * WindowNm && fits[i - 1].Slope > 0 && fits[i].Slope <= 0)
                return true;
        }

        return false;
    }

    private readonly record struct Fit(double Nm, double Value, double Slope, double Curvature)
    {
        /// <summary>Least-squares parabola around a sample; null where the window has fewer than four samples or is cut off.</summary>
        public static Fit? At(ReadOnlySpan<double> nm, ReadOnlySpan<double> values, int centre)
        {
            double s1 = 0, s2 = 0, s3 = 0, s4 = 0, v0 = 0, v1 = 0, v2 = 0;
            int count = 0;
            for (int i = 0; i < nm.Length; i++)
            {
                double d = (nm[i] - nm[centre]) / WindowNm;
                if (Math.Abs(d) > 1)
                    continue;
                count++;
                (s1, s2, s3, s4) = (s1 + d, s2 + (d * d), s3 + (d * d * d), s4 + (d * d * d * d));
                (v0, v1, v2) = (v0 + values[i], v1 + (d * values[i]), v2 + (d * d * values[i]));
            }

            if (count < 4 || nm[centre] - nm[0] < WindowNm || nm[^1] - nm[centre] < WindowNm)
                return null;
            // Normal equations of a + b d + c d², by Cramer's rule.
            double det = Det(count, s1, s2, s1, s2, s3, s2, s3, s4);
            double a = Det(v0, s1, s2, v1, s2, s3, v2, s3, s4) / det;
            double b = Det(count, v0, s2, s1, v1, s3, s2, v2, s4) / det;
            double c = Det(count, s1, v0, s1, s2, v1, s2, s3, v2) / det;
            return double.IsFinite(a + b + c) ? new(nm[centre], a, b / WindowNm, 2 * c / (WindowNm * WindowNm)) : null;
        }

        private static double Det(double a, double b, double c, double d, double e, double f, double g, double h, double i) =>
            (a * ((e * i) - (f * h))) - (b * ((d * i) - (f * g))) + (c * ((d * h) - (e * g)));
    }
}
