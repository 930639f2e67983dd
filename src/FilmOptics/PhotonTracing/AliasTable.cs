namespace FilmOptics.PhotonTracing;

/// <summary>Draws an index with given probabilities in constant time.</summary>
/// <remarks>
/// Source: A. J. Walker's alias method, in the construction of M. D. Vose, IEEE Trans. Softw. Eng. 17 (1991) 972.
/// Probabilities are held in steps of 2^−32.
/// </remarks>
internal sealed class AliasTable
{
    private readonly double[] _keepBelow;
    private readonly int[] _alias;

    /// <param name="weights">None is negative. Where all are 0, the first is always drawn.</param>
    public AliasTable(ReadOnlySpan<double> weights)
    {
        int count = weights.Length;
        double sum = 0;
        foreach (double weight in weights)
            sum += weight;
        (_keepBelow, _alias) = (new double[count], new int[count]);
        var small = new Stack<int>();
        var large = new Stack<int>();
        for (int i = 0; i < count; i++)
        {
            _keepBelow[i] = sum > 0 ? weights[i] / sum * count : 1;
            _alias[i] = i;
            (_keepBelow[i] < 1 ? small : large).Push(i);
        }

        while (small.Count > 0 && large.Count > 0)
        {
            int poor = small.Pop(), rich = large.Pop();
            _alias[poor] = rich;
            _keepBelow[rich] -= 1 - _keepBelow[poor];
            (_keepBelow[rich] < 1 ? small : large).Push(rich);
        }

        // What is left over differs from 1 by rounding alone, but an index of weight 0 must not be drawn even so.
        int likeliest = weights.IndexOf(Largest(weights));
        foreach (int i in small.Concat(large))
            (_keepBelow[i], _alias[i]) = weights[i] > 0 ? (1, i) : (0, likeliest);
    }

    /// <param name="share">A random number strictly between 0 and 1.</param>
    public int Draw(double share)
    {
        double scaled = share * _keepBelow.Length;
        int i = (int)scaled;
        return scaled - i < _keepBelow[i] ? i : _alias[i];
    }

    private static double Largest(ReadOnlySpan<double> weights)
    {
        double largest = weights[0];
        foreach (double weight in weights)
            largest = Math.Max(largest, weight);
        return largest;
    }
}
