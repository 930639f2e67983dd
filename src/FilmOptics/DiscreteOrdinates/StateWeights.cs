namespace FilmOptics.DiscreteOrdinates;

/// <summary>How each bin's answer is a weighted sum of the answers of neighbouring states; weights of a bin sum to 1.</summary>
/// <param name="States">States solved.</param>
/// <param name="Width">States that a bin draws on.</param>
/// <param name="First">First of them, by bin.</param>
/// <param name="Weights">Their weights, at [bin × width + i].</param>
internal sealed record StateWeights(int States, int Width, int[] First, double[] Weights)
{
    /// <summary>Every bin is a state of its own.</summary>
    public static StateWeights Each(int bins)
    {
        var ones = new double[bins];
        Array.Fill(ones, 1);
        return new(bins, 1, [.. Enumerable.Range(0, bins)], ones);
    }

    /// <summary>A sum over bins brought to the states: moment[state] = Σ weight × value.</summary>
    public double[] Gather(ReadOnlySpan<double> values)
    {
        var moment = new double[States];
        for (int bin = 0; bin < values.Length; bin++)
        {
            if (values[bin] == 0)
                continue;
            for (int i = 0; i < Width; i++)
                moment[First[bin] + i] += values[bin] * Weights[(bin * Width) + i];
        }

        return moment;
    }

    /// <summary>Values of the states brought to a bin.</summary>
    public double At(int bin, ReadOnlySpan<double> stateValues)
    {
        double sum = 0;
        for (int i = 0; i < Width; i++)
            sum += stateValues[First[bin] + i] * Weights[(bin * Width) + i];
        return sum;
    }
}
