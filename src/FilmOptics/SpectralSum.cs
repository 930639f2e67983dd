using System.Numerics;

namespace FilmOptics;

/// <summary>Sums of products over the grid.</summary>
internal static class SpectralSum
{
    public static double Of(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        var sums = Vector<double>.Zero;
        int i = 0;
        for (; i <= a.Length - Vector<double>.Count; i += Vector<double>.Count)
            sums += new Vector<double>(a[i..]) * new Vector<double>(b[i..]);
        double sum = Vector.Sum(sums);
        for (; i < a.Length; i++)
            sum += a[i] * b[i];
        return sum;
    }

    public static double Of(ReadOnlySpan<double> a, ReadOnlySpan<double> b, ReadOnlySpan<double> c)
    {
        var sums = Vector<double>.Zero;
        int i = 0;
        for (; i <= a.Length - Vector<double>.Count; i += Vector<double>.Count)
            sums += new Vector<double>(a[i..]) * new Vector<double>(b[i..]) * new Vector<double>(c[i..]);
        double sum = Vector.Sum(sums);
        for (; i < a.Length; i++)
            sum += a[i] * b[i] * c[i];
        return sum;
    }
}
