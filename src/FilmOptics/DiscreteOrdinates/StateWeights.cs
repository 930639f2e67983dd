namespace FilmOptics.DiscreteOrdinates;

/// <summary>How each bin's answer is a weighted sum of the answers of neighbouring states; weights of a bin sum to 1.</summary>
/// <param name="bins">Bins.</param>
/// <param name="width">States that a bin draws on.</param>
internal sealed class StateWeights(int bins, int width)
{
    public int Width { get; } = width;

    /// <summary>First of the states, by bin.</summary>
    public int[] First { get; } = new int[bins];

    /// <summary>Their weights, at [bin × width + i].</summary>
    public double[] Weights { get; } = new double[bins * width];

    /// <summary>Values of the states brought to a bin.</summary>
    public double At(int bin, ReadOnlySpan<double> stateValues)
    {
        var weights = Weights.AsSpan(bin * Width, Width);
        var values = stateValues.Slice(First[bin], Width);
        return LaneAlgebra.Dot(values, weights);
    }

    /// <summary>Lets a bin draw on states that lie at 0, 1, 2… by Lagrange's formula.</summary>
    /// <param name="bin">The bin.</param>
    /// <param name="place">Where it lies among them.</param>
    /// <param name="states">How many states there are, at least the width.</param>
    public void Interpolate(int bin, double place, int states)
    {
        int first = Math.Clamp((int)place - ((Width - 1) / 2), 0, states - Width);
        First[bin] = first;
        double t = place - first;
        var weights = Weights.AsSpan(bin * Width, Width);
        for (int i = 0; i < weights.Length; i++)
        {
            weights[i] = 1;
            for (int k = 0; k < weights.Length; k++)
            {
                if (k != i)
                    weights[i] *= (t - k) / (i - k);
            }
        }
    }

    /// <summary>Lets a bin take the answer of the state nearest to it.</summary>
    /// <param name="bin">The bin.</param>
    /// <param name="place">Where it lies.</param>
    /// <param name="states">Where the states lie, rising.</param>
    public void TakeNearest(int bin, int place, ReadOnlySpan<int> states)
    {
        int after = states.BinarySearch(place);
        after = after >= 0 ? after : Math.Min(~after, states.Length - 1);
        int nearest = after > 0 && place - states[after - 1] < states[after] - place ? after - 1 : after;
        First[bin] = Math.Min(nearest, states.Length - Width);
        var weights = Weights.AsSpan(bin * Width, Width);
        weights.Clear();
        weights[nearest - First[bin]] = 1;
    }
}
