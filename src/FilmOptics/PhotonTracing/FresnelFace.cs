namespace FilmOptics.PhotonTracing;

/// <summary>A flat face between two clear media, for unpolarised light.</summary>
internal static class FresnelFace
{
    /// <summary>Share reflected, from the textbook amplitudes of the two polarisations; 1 beyond the critical angle.</summary>
    /// <param name="indexRatioFactor">Index before the face ÷ index behind it.</param>
    /// <param name="cosine">Cosine of incidence, 0…1.</param>
    /// <param name="behindCosine">Cosine of the refracted ray; 0 beyond the critical angle.</param>
    public static double Reflectance(double indexRatioFactor, double cosine, out double behindCosine)
    {
        // cos²t = 1 − r² sin²i, written so that grazing rays keep their digits and equal indices reflect exactly nothing.
        double square = (1 - (indexRatioFactor * indexRatioFactor))
            + (indexRatioFactor * indexRatioFactor * cosine * cosine);
        if (square <= 0)
        {
            behindCosine = 0;
            return 1;
        }

        behindCosine = Math.Sqrt(square);
        double across = ((indexRatioFactor * cosine) - behindCosine) / ((indexRatioFactor * cosine) + behindCosine);
        double along = (cosine - (indexRatioFactor * behindCosine)) / (cosine + (indexRatioFactor * behindCosine));
        return ((across * across) + (along * along)) / 2;
    }
}
