namespace FilmOptics.BeerLambert;

/// <summary>All generations of emission and absorption at once: J = J⁰ + Q J.</summary>
internal static class Cascade
{
    /// <summary>Excitations of each lot, all generations.</summary>
    /// <remarks>
    /// Elimination without a single subtraction (Grassmann, Taksar and Heyman 1985, for Markov chains): the diagonal of I − Q is the share that
    /// ends plus the share that goes to other lots, both known directly. Digits are kept even where light is absorbed a million times.
    /// </remarks>
    /// <param name="again">Q, row by row: excitations of lot i per excitation of lot j, at [i, j]. Overwritten.</param>
    /// <param name="ended">Share of each lot's excitations that end without exciting any lot. Overwritten.</param>
    /// <param name="excitations">In: by source light. Out: all.</param>
    /// <returns>Whether every excitation comes to an end.</returns>
    public static bool Sum(Span<double> again, Span<double> ended, Span<double> excitations)
    {
        int count = excitations.Length;
        for (int k = 0; k < count; k++)
        {
            double pivot = ended[k];
            for (int i = k + 1; i < count; i++)
                pivot += again[(i * count) + k];
            bool isReached = excitations[k] != 0;
            for (int j = k + 1; j < count; j++)
                isReached |= again[(k * count) + j] != 0;
            if (pivot == 0 && !isReached)
                pivot = 1;
            if (pivot == 0)
                return false;
            again[(k * count) + k] = pivot;
            for (int i = k + 1; i < count; i++)
            {
                double share = again[(i * count) + k] / pivot;
                excitations[i] += share * excitations[k];
                for (int j = k + 1; j < count; j++)
                    again[(i * count) + j] += share * again[(k * count) + j];
            }

            for (int j = k + 1; j < count; j++)
                ended[j] += ended[k] / pivot * again[(k * count) + j];
        }

        for (int k = count - 1; k >= 0; k--)
        {
            for (int j = k + 1; j < count; j++)
                excitations[k] += again[(k * count) + j] * excitations[j];
            excitations[k] /= again[(k * count) + k];
        }

        return true;
    }
}
