namespace FilmOptics.DiscreteOrdinates;

/// <summary>A small dense system of equations.</summary>
internal static class DenseSolver
{
    /// <summary>right ← matrix⁻¹ right by elimination without exchanges.</summary>
    /// <remarks>For 1 − K with non-negative K whose columns sum to at most 1: exchanges are not needed there.</remarks>
    /// <param name="matrix">Rows of the matrix; overwritten.</param>
    /// <param name="right">Right-hand side; holds the answer.</param>
    public static void Solve(Span<double> matrix, Span<double> right)
    {
        int n = right.Length;
        for (int pivot = 0; pivot < n; pivot++)
        {
            var pivotRow = matrix.Slice(pivot * n, n);
            double reciprocal = 1 / pivotRow[pivot];
            for (int row = pivot + 1; row < n; row++)
            {
                var target = matrix.Slice(row * n, n);
                double factor = target[pivot] * reciprocal;
                LaneAlgebra.AddScaled(target[(pivot + 1)..], pivotRow[(pivot + 1)..], -factor);
                right[row] -= factor * right[pivot];
            }
        }

        for (int row = n - 1; row >= 0; row--)
        {
            double sum = right[row];
            for (int column = row + 1; column < n; column++)
                sum -= matrix[(row * n) + column] * right[column];
            right[row] = sum / matrix[(row * n) + row];
        }
    }
}
