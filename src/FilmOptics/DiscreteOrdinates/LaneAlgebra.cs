using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>What becomes of a result that stands already.</summary>
internal enum Into
{
    /// <summary>Replaced.</summary>
    Set,

    /// <summary>Added to.</summary>
    Add,

    /// <summary>Taken from.</summary>
    Subtract,
}

/// <summary>Dense algebra on matrices of lanes: no branch depends on the numbers.</summary>
internal static class LaneAlgebra
{
    private const MethodImplOptions Hot = MethodImplOptions.AggressiveOptimization;

    /// <summary>left · right, put into the result.</summary>
    /// <param name="result">Where it goes.</param>
    /// <param name="left">Left factor.</param>
    /// <param name="right">Right factor.</param>
    /// <param name="into">Whether it replaces the result, is added to it or taken from it.</param>
    /// <param name="leftTransposed">Whether left is read by columns.</param>
    /// <param name="upperOnly">Whether entries left of the diagonal may be left out.</param>
    [MethodImpl(Hot)]
    public static void Multiply<T>(
        LaneMatrix<T> result, LaneMatrix<T> left, LaneMatrix<T> right, Into into = Into.Set, bool leftTransposed = false, bool upperOnly = false)
        where T : struct, ILanes<T>
    {
        int rows = result.Rows, columns = result.Columns, inner = right.Rows;
        (int leftRow, int leftStep) = leftTransposed ? (1, left.Stride) : (left.Stride, 1);
        ref T r = ref result.First;
        ref T a = ref left.First;
        ref T b = ref right.First;
        int row = 0;
        for (; row + 1 < rows; row += 2)
        {
            int column = upperOnly ? row & ~3 : 0;
            for (; column + 3 < columns; column += 4)
            {
                T s00 = default, s01 = default, s02 = default, s03 = default, s10 = default, s11 = default, s12 = default, s13 = default;
                ref T a0 = ref Unsafe.Add(ref a, row * leftRow);
                ref T a1 = ref Unsafe.Add(ref a, (row + 1) * leftRow);
                ref T bk = ref Unsafe.Add(ref b, column);
                for (int k = 0; k < inner; k++)
                {
                    T x = a0, y = a1;
                    T b0 = bk, b1 = Unsafe.Add(ref bk, 1), b2 = Unsafe.Add(ref bk, 2), b3 = Unsafe.Add(ref bk, 3);
                    s00 = T.MultiplyAdd(x, b0, s00);
                    s01 = T.MultiplyAdd(x, b1, s01);
                    s02 = T.MultiplyAdd(x, b2, s02);
                    s03 = T.MultiplyAdd(x, b3, s03);
                    s10 = T.MultiplyAdd(y, b0, s10);
                    s11 = T.MultiplyAdd(y, b1, s11);
                    s12 = T.MultiplyAdd(y, b2, s12);
                    s13 = T.MultiplyAdd(y, b3, s13);
                    a0 = ref Unsafe.Add(ref a0, leftStep);
                    a1 = ref Unsafe.Add(ref a1, leftStep);
                    bk = ref Unsafe.Add(ref bk, right.Stride);
                }

                ref T r0 = ref Unsafe.Add(ref r, (row * result.Stride) + column);
                ref T r1 = ref Unsafe.Add(ref r0, result.Stride);
                Put(ref r0, s00, into);
                Put(ref Unsafe.Add(ref r0, 1), s01, into);
                Put(ref Unsafe.Add(ref r0, 2), s02, into);
                Put(ref Unsafe.Add(ref r0, 3), s03, into);
                Put(ref r1, s10, into);
                Put(ref Unsafe.Add(ref r1, 1), s11, into);
                Put(ref Unsafe.Add(ref r1, 2), s12, into);
                Put(ref Unsafe.Add(ref r1, 3), s13, into);
            }

            for (; column < columns; column++)
            {
                T s0 = default, s1 = default;
                for (int k = 0; k < inner; k++)
                {
                    T bk = Unsafe.Add(ref b, (k * right.Stride) + column);
                    s0 = T.MultiplyAdd(Unsafe.Add(ref a, (row * leftRow) + (k * leftStep)), bk, s0);
                    s1 = T.MultiplyAdd(Unsafe.Add(ref a, ((row + 1) * leftRow) + (k * leftStep)), bk, s1);
                }

                Put(ref Unsafe.Add(ref r, (row * result.Stride) + column), s0, into);
                Put(ref Unsafe.Add(ref r, ((row + 1) * result.Stride) + column), s1, into);
            }
        }

        if (row < rows)
        {
            for (int column = upperOnly ? row : 0; column < columns; column++)
            {
                T s = default;
                for (int k = 0; k < inner; k++)
                    s = T.MultiplyAdd(Unsafe.Add(ref a, (row * leftRow) + (k * leftStep)), Unsafe.Add(ref b, (k * right.Stride) + column), s);
                Put(ref Unsafe.Add(ref r, (row * result.Stride) + column), s, into);
            }
        }
    }

    /// <summary>target += source × factor.</summary>
    [MethodImpl(Hot)]
    public static void AddScaled(Span<double> target, ReadOnlySpan<double> source, double factor)
    {
        var wide = Vector512.Create(factor);
        int i = 0;
        for (; i <= source.Length - Vector512<double>.Count; i += Vector512<double>.Count)
        {
            Vector512.MultiplyAddEstimate(Vector512.Create(source[i..]), wide, Vector512.Create<double>(target[i..])).CopyTo(target[i..]);
        }

        for (; i < source.Length; i++)
            target[i] += source[i] * factor;
    }

    /// <summary>Σ one × other.</summary>
    public static double Dot(ReadOnlySpan<double> one, ReadOnlySpan<double> other)
    {
        double sum = 0;
        int i = 0;
        if (one.Length >= Vector512<double>.Count)
        {
            var wide = Vector512<double>.Zero;
            for (; i <= one.Length - Vector512<double>.Count; i += Vector512<double>.Count)
                wide = Vector512.MultiplyAddEstimate(Vector512.Create(one[i..]), Vector512.Create(other[i..]), wide);
            sum = Vector512.Sum(wide);
        }

        for (; i < one.Length; i++)
            sum += one[i] * other[i];
        return sum;
    }

    /// <summary>Lower Cholesky factor in place of the lower triangle; the diagonal holds reciprocals.</summary>
    [MethodImpl(Hot)]
    public static void Cholesky<T>(LaneMatrix<T> matrix)
        where T : struct, ILanes<T>
    {
        int n = matrix.Rows, stride = matrix.Stride;
        ref T m = ref matrix.First;
        for (int j = 0; j < n; j++)
        {
            ref T rowJ = ref Unsafe.Add(ref m, j * stride);
            T square = Unsafe.Add(ref rowJ, j);
            for (int k = 0; k < j; k++)
                square -= Unsafe.Add(ref rowJ, k) * Unsafe.Add(ref rowJ, k);
            T reciprocal = T.All(1) / T.Root(square);
            Unsafe.Add(ref rowJ, j) = reciprocal;
            int i = j + 1;
            for (; i + 3 < n; i += 4)
            {
                ref T r0 = ref Unsafe.Add(ref m, i * stride);
                ref T r1 = ref Unsafe.Add(ref r0, stride);
                ref T r2 = ref Unsafe.Add(ref r1, stride);
                ref T r3 = ref Unsafe.Add(ref r2, stride);
                T s0 = default, s1 = default, s2 = default, s3 = default;
                for (int k = 0; k < j; k++)
                {
                    T x = Unsafe.Add(ref rowJ, k);
                    s0 = T.MultiplyAdd(x, Unsafe.Add(ref r0, k), s0);
                    s1 = T.MultiplyAdd(x, Unsafe.Add(ref r1, k), s1);
                    s2 = T.MultiplyAdd(x, Unsafe.Add(ref r2, k), s2);
                    s3 = T.MultiplyAdd(x, Unsafe.Add(ref r3, k), s3);
                }

                Unsafe.Add(ref r0, j) = (Unsafe.Add(ref r0, j) - s0) * reciprocal;
                Unsafe.Add(ref r1, j) = (Unsafe.Add(ref r1, j) - s1) * reciprocal;
                Unsafe.Add(ref r2, j) = (Unsafe.Add(ref r2, j) - s2) * reciprocal;
                Unsafe.Add(ref r3, j) = (Unsafe.Add(ref r3, j) - s3) * reciprocal;
            }

            for (; i < n; i++)
            {
                ref T rowI = ref Unsafe.Add(ref m, i * stride);
                T s = default;
                for (int k = 0; k < j; k++)
                    s = T.MultiplyAdd(Unsafe.Add(ref rowJ, k), Unsafe.Add(ref rowI, k), s);
                Unsafe.Add(ref rowI, j) = (Unsafe.Add(ref rowI, j) - s) * reciprocal;
            }
        }
    }

    /// <summary>rows ← L⁻¹ rows, with the factor of <see cref="Cholesky"/>.</summary>
    [MethodImpl(Hot)]
    public static void SolveLower<T>(LaneMatrix<T> factor, LaneMatrix<T> rows)
        where T : struct, ILanes<T>
    {
        for (int i = 0; i < rows.Rows; i++)
            Reduce(ref rows.First, rows.Stride, rows.Columns, i, ref Unsafe.Add(ref factor.First, i * factor.Stride), 0, i, factor[i, i]);
    }

    /// <summary>rows ← matrix⁻¹ rows by elimination without exchanges, for matrices of the kind 1 − (shares passed on).</summary>
    /// <remarks>The matrix is overwritten by its factors, reciprocals on the diagonal.</remarks>
    [MethodImpl(Hot)]
    public static void Solve<T>(LaneMatrix<T> matrix, LaneMatrix<T> rows)
        where T : struct, ILanes<T>
    {
        int n = matrix.Rows, stride = matrix.Stride;
        ref T m = ref matrix.First;
        for (int i = 0; i < n; i++)
        {
            ref T rowI = ref Unsafe.Add(ref m, i * stride);
            for (int k = 0; k < i; k++)
            {
                ref T column = ref Unsafe.Add(ref m, k);
                T s0 = Unsafe.Add(ref rowI, k), s1 = default;
                int l = 0;
                for (; l + 1 < k; l += 2)
                {
                    s0 -= Unsafe.Add(ref rowI, l) * Unsafe.Add(ref column, l * stride);
                    s1 = T.MultiplyAdd(Unsafe.Add(ref rowI, l + 1), Unsafe.Add(ref column, (l + 1) * stride), s1);
                }

                if (l < k)
                    s0 -= Unsafe.Add(ref rowI, l) * Unsafe.Add(ref column, l * stride);
                Unsafe.Add(ref rowI, k) = (s0 - s1) * Unsafe.Add(ref m, (k * stride) + k);
            }

            Reduce(ref Unsafe.Add(ref m, i), stride, n - i, i, ref rowI, 0, i, T.All(1));
            Unsafe.Add(ref rowI, i) = T.All(1) / Unsafe.Add(ref rowI, i);
            Reduce(ref rows.First, rows.Stride, rows.Columns, i, ref rowI, 0, i, T.All(1));
        }

        for (int i = n - 1; i >= 0; i--)
        {
            ref T rowI = ref Unsafe.Add(ref m, i * stride);
            Reduce(ref rows.First, rows.Stride, rows.Columns, i, ref rowI, i + 1, n, Unsafe.Add(ref rowI, i));
        }
    }

    // target row ← (target row − Σ factor[k] · row k) · scale, for k from first to last.
    [MethodImpl(Hot)]
    private static void Reduce<T>(ref T rows, int stride, int columns, int target, ref T factor, int first, int last, T scale)
        where T : struct, ILanes<T>
    {
        ref T rowI = ref Unsafe.Add(ref rows, target * stride);
        int column = 0;
        for (; column + 7 < columns; column += 8)
        {
            T s0 = default, s1 = default, s2 = default, s3 = default, s4 = default, s5 = default, s6 = default, s7 = default;
            ref T rowK = ref Unsafe.Add(ref rows, (first * stride) + column);
            for (int k = first; k < last; k++)
            {
                T x = Unsafe.Add(ref factor, k);
                s0 = T.MultiplyAdd(x, rowK, s0);
                s1 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 1), s1);
                s2 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 2), s2);
                s3 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 3), s3);
                s4 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 4), s4);
                s5 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 5), s5);
                s6 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 6), s6);
                s7 = T.MultiplyAdd(x, Unsafe.Add(ref rowK, 7), s7);
                rowK = ref Unsafe.Add(ref rowK, stride);
            }

            ref T r = ref Unsafe.Add(ref rowI, column);
            r = (r - s0) * scale;
            Unsafe.Add(ref r, 1) = (Unsafe.Add(ref r, 1) - s1) * scale;
            Unsafe.Add(ref r, 2) = (Unsafe.Add(ref r, 2) - s2) * scale;
            Unsafe.Add(ref r, 3) = (Unsafe.Add(ref r, 3) - s3) * scale;
            Unsafe.Add(ref r, 4) = (Unsafe.Add(ref r, 4) - s4) * scale;
            Unsafe.Add(ref r, 5) = (Unsafe.Add(ref r, 5) - s5) * scale;
            Unsafe.Add(ref r, 6) = (Unsafe.Add(ref r, 6) - s6) * scale;
            Unsafe.Add(ref r, 7) = (Unsafe.Add(ref r, 7) - s7) * scale;
        }

        for (; column < columns; column++)
        {
            T s = default;
            for (int k = first; k < last; k++)
                s = T.MultiplyAdd(Unsafe.Add(ref factor, k), Unsafe.Add(ref rows, (k * stride) + column), s);
            Unsafe.Add(ref rowI, column) = (Unsafe.Add(ref rowI, column) - s) * scale;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Put<T>(ref T target, T value, Into into)
        where T : struct, ILanes<T> => target = into switch
    {
        Into.Add => target + value,
        Into.Subtract => target - value,
        _ => value,
    };
}
