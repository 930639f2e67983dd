namespace FilmOptics;

/// <summary>All generations of re-absorption at once: J = J⁰ + P Φ J.</summary>
internal static class Cascade
{
    /// <summary>Excitations of each lot per source photon.</summary>
    /// <param name="reabsorbed">P: share of a photon emitted by j (second index) that i (first) absorbs.</param>
    /// <param name="yieldShares">Φ, 0…1.</param>
    /// <param name="first">J⁰: excitations by source light.</param>
    /// <exception cref="NumericalFailureException">Light never leaves: every emitted photon is absorbed and emitted again.</exception>
    public static double[] Solve(double[,] reabsorbed, ReadOnlySpan<double> yieldShares, ReadOnlySpan<double> first)
    {
        int n = first.Length;
        var matrix = new double[n, n];
        var solution = first.ToArray();
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                matrix[i, j] = (i == j ? 1 : 0) - (reabsorbed[i, j] * yieldShares[j]);
        }

        // I − PΦ is a column-dominant M-matrix: elimination without pivoting is stable and keeps all signs.
        for (int k = 0; k < n; k++)
        {
            if (!(matrix[k, k] > 1e-13))
                throw new NumericalFailureException("Emitted light can never leave: every photon is absorbed by dots and emitted again.");
            for (int i = k + 1; i < n; i++)
            {
                double factor = matrix[i, k] / matrix[k, k];
                if (factor == 0)
                    continue;
                for (int j = k; j < n; j++)
                    matrix[i, j] -= factor * matrix[k, j];
                solution[i] -= factor * solution[k];
            }
        }

        for (int i = n - 1; i >= 0; i--)
        {
            for (int j = i + 1; j < n; j++)
                solution[i] -= matrix[i, j] * solution[j];
            solution[i] /= matrix[i, i];
        }

        return solution;
    }
}
