using Colorimetry;

namespace FilmOptics;

/// <summary>How sure a traced result is. All standard errors are one standard deviation of the mean.</summary>
/// <remarks>
/// Source photons are independent, so a share p of N photons has the binomial standard error √(p (1 − p)/N), and weighted
/// sums over the light above have that of a multinomial: nothing is estimated from batches.
/// </remarks>
public sealed record TracingStatistics
{
    private readonly double[] _above;

    internal TracingStatistics(Spectrum<PhotonPerNm> above) => _above = above.Samples.ToArray();

    /// <summary>Source photons traced to their end.</summary>
    public required long Photons { get; init; }

    /// <summary>Source photons asked for; more than <see cref="Photons"/> after an interruption.</summary>
    public required long PhotonsAsked { get; init; }

    /// <summary>Seed that gives the same result again, on any number of threads.</summary>
    public required ulong Seed { get; init; }

    /// <summary>Scatterings, absorptions and faces met by all photons.</summary>
    public required long Interactions { get; init; }

    /// <summary>Standard error of each line of the budget. Its sum means nothing: the lines are not independent.</summary>
    public required PhotonBudget StandardError { get; init; }

    /// <summary>Standard error of <see cref="FilmOutput.Unconverted"/> in each bin.</summary>
    public required Spectrum<PhotonPerNm> UnconvertedStandardError { get; init; }

    /// <summary>Standard error of each of <see cref="FilmOutput.ConvertedByLot"/> in each bin.</summary>
    public required IReadOnlyList<Spectrum<PhotonPerNm>> ConvertedByLotStandardError { get; init; }

    /// <summary>Largest standard error of a line of the budget that ends a photon.</summary>
    public double LargestBudgetErrorShare => new[]
    {
        StandardError.Unconverted, StandardError.Converted, StandardError.LostBelow, StandardError.LostAbove,
        StandardError.LostInHost, StandardError.LostAtEdges, StandardError.LostInLots.Append(0).Max(),
    }.Max();

    /// <summary>Standard error of Σ weight × light above: of power, lumens, a tristimulus value.</summary>
    /// <param name="weightPerPhoton">Weight of a photon in each bin of the grid, 471 values.</param>
    public double StandardErrorOf(ReadOnlySpan<double> weightPerPhoton) =>
        Math.Sqrt(Covariance(weightPerPhoton, weightPerPhoton));

    /// <summary>Standard errors of the chromaticity of all light above, x and y.</summary>
    /// <param name="observer">Colour-matching functions.</param>
    public (double X, double Y) ChromaticityStandardError(StandardObserver observer)
    {
        ArgumentNullException.ThrowIfNull(observer);
        var x = PerPhoton(observer.XBar);
        var y = PerPhoton(observer.YBar);
        var z = PerPhoton(observer.ZBar);
        double sumX = Mean(x), sum = sumX + Mean(y) + Mean(z), sumY = Mean(y);
        if (!(sum > 0))
            return (0, 0);

        // To first order the error of X/(X + Y + Z) is that of a sum whose weights are (x̄ − x · (x̄ + ȳ + z̄))/(X + Y + Z).
        var all = new double[x.Length];
        for (int i = 0; i < all.Length; i++)
            all[i] = x[i] + y[i] + z[i];
        return (ErrorOfShare(x, all, sumX / sum, sum), ErrorOfShare(y, all, sumY / sum, sum));
    }

    private static double[] PerPhoton(ReadOnlySpan<double> colourMatching)
    {
        // A photon's energy goes with 1/λ; the scale cancels in a chromaticity.
        var weights = new double[colourMatching.Length];
        for (int i = 0; i < weights.Length; i++)
            weights[i] = colourMatching[i] / WavelengthGrid.NmAt(i);
        return weights;
    }

    private double ErrorOfShare(double[] part, double[] all, double share, double sum)
    {
        var weights = new double[part.Length];
        for (int i = 0; i < weights.Length; i++)
            weights[i] = (part[i] - (share * all[i])) / sum;
        return StandardErrorOf(weights);
    }

    private double Mean(ReadOnlySpan<double> weights)
    {
        double sum = 0;
        for (int i = 0; i < _above.Length; i++)
            sum += weights[i] * _above[i];
        return sum;
    }

    private double Covariance(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        double product = 0;
        for (int i = 0; i < _above.Length; i++)
            product += left[i] * right[i] * _above[i];
        return Math.Max(0, product - (Mean(left) * Mean(right))) / Photons;
    }
}

/// <summary>How far a tracing run has come.</summary>
/// <param name="PhotonsDone">Source photons traced to their end.</param>
/// <param name="PhotonsAsked">Source photons asked for.</param>
/// <param name="StandardErrorShare">Largest standard error of a budget line so far.</param>
public sealed record TracingProgress(long PhotonsDone, long PhotonsAsked, double StandardErrorShare);
