namespace Dotcoat.Inspection;

/// <summary>What a measured curve holds, from its own samples: nothing is resampled.</summary>
/// <param name="PeakAt">Where it is greatest: the vertex of the parabola through the three highest neighbours.</param>
/// <param name="Peak">Its greatest sample.</param>
/// <param name="Smallest">Its smallest sample.</param>
/// <param name="FullWidth">Full width at half of the greatest sample; null where it does not fall to half on both sides.</param>
/// <param name="Centroid">Mean position, weighted by the curve (trapezoid rule); null where the integral is not above 0.</param>
/// <param name="Integral">Trapezoid rule.</param>
internal sealed record CurveFigures(double PeakAt, double Peak, double Smallest, double? FullWidth, double? Centroid, double Integral)
{
    /// <summary>The figures of samples at rising positions.</summary>
    public static CurveFigures Of(ReadOnlySpan<double> at, ReadOnlySpan<double> values)
    {
        int top = 0;
        double smallest = values[0], integral = 0, moment = 0;
        for (int i = 1; i < values.Length; i++)
        {
            if (values[i] > values[top])
                top = i;
            smallest = Math.Min(smallest, values[i]);
            double step = at[i] - at[i - 1];
            integral += step * (values[i] + values[i - 1]) / 2;
            moment += step * ((values[i] * at[i]) + (values[i - 1] * at[i - 1])) / 2;
        }

        double half = values[top] / 2;
        double? from = null, to = null;
        foreach (var crossing in LevelCrossing.Of(at, values, half))
        {
            if (crossing.At <= at[top])
                from = crossing.At; // the last one before the peak
            else
                to ??= crossing.At; // the first one after it
        }

        return new(Vertex(at, values, top), values[top], smallest, to - from, integral > 0 ? moment / integral : null, integral);
    }

    private static double Vertex(ReadOnlySpan<double> at, ReadOnlySpan<double> values, int top)
    {
        if (top == 0 || top == values.Length - 1)
            return at[top];
        double left = (values[top] - values[top - 1]) / (at[top] - at[top - 1]);
        double right = (values[top + 1] - values[top]) / (at[top + 1] - at[top]);
        // The slopes belong to the middles of the two intervals; the vertex is where the line through them is 0.
        double middleLeft = (at[top] + at[top - 1]) / 2, middleRight = (at[top + 1] + at[top]) / 2;
        return left == right ? at[top] : middleLeft + ((middleRight - middleLeft) * left / (left - right));
    }
}

/// <summary>Where a curve passes a level, linear between samples.</summary>
/// <param name="At">Position.</param>
/// <param name="Rising">Whether it rises there, towards greater positions.</param>
internal sealed record LevelCrossing(double At, bool Rising)
{
    /// <summary>All crossings, in rising order.</summary>
    public static List<LevelCrossing> Of(ReadOnlySpan<double> at, ReadOnlySpan<double> values, double level)
    {
        var crossings = new List<LevelCrossing>();
        for (int i = 1; i < values.Length; i++)
        {
            bool above = values[i] >= level;
            if (above == values[i - 1] >= level)
                continue;
            double share = (level - values[i - 1]) / (values[i] - values[i - 1]);
            crossings.Add(new(at[i - 1] + (share * (at[i] - at[i - 1])), above));
        }

        return crossings;
    }
}
