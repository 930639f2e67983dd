namespace FilmOptics.DiscreteOrdinates;

/// <summary>Integrals over tables against angle, exact for what varies smoothly between the nodes.</summary>
/// <remarks>A measured profile may be narrower than the nodes are apart; what it multiplies is smooth. So the table is integrated
/// finely against the polynomials through the nodes, and each node gets its share.</remarks>
internal static class AngularMoments
{
    private static readonly (double[] Nodes, double[] Weights) Fine = GaussLegendre.OnUnitInterval(6);

    /// <summary>∫ table(μ) ℓ_j(μ) μ dμ over 0…1, with ℓ_j the polynomial that is 1 at node j and 0 at the others.</summary>
    public static double[] Of(Func<double, double> table, ReadOnlySpan<double> anglesDeg, ReadOnlySpan<double> cosines)
    {
        var sums = new double[cosines.Length];
        foreach (var (mu, weight) in Points(anglesDeg, []))
        {
            double value = table(mu) * mu * weight;
            double[] basis = Interpolation(cosines, mu);
            for (int j = 0; j < sums.Length; j++)
                sums[j] += value * basis[j];
        }

        return sums;
    }

    /// <summary>∫ table(μ) μ dμ over 0…1.</summary>
    public static double Flux(Func<double, double> table, ReadOnlySpan<double> anglesDeg, ReadOnlySpan<double> moreAnglesDeg)
    {
        double sum = 0;
        foreach (var (mu, weight) in Points(anglesDeg, moreAnglesDeg))
            sum += table(mu) * mu * weight;
        return sum;
    }

    /// <summary>Weights of the values at the nodes for the polynomial through them, at a cosine.</summary>
    public static double[] Interpolation(ReadOnlySpan<double> cosines, double atCosine)
    {
        var weights = new double[cosines.Length];
        for (int j = 0; j < weights.Length; j++)
        {
            weights[j] = 1;
            for (int k = 0; k < weights.Length; k++)
            {
                if (k != j)
                    weights[j] *= (atCosine - cosines[k]) / (cosines[j] - cosines[k]);
            }
        }

        return weights;
    }

    private static List<(double Cosine, double Weight)> Points(ReadOnlySpan<double> anglesDeg, ReadOnlySpan<double> moreAnglesDeg)
    {
        // Tables are linear in the angle between their rows: integrate over the angle, piece by piece, none wider than 5 degrees.
        SortedSet<double> ends = [.. anglesDeg, .. moreAnglesDeg];
        for (int angle = 0; angle <= 90; angle += 5)
            ends.Add(angle);
        double[] angles = [.. ends];
        List<(double Cosine, double Weight)> points = [];
        for (int piece = 0; piece + 1 < angles.Length; piece++)
        {
            double step = (angles[piece + 1] - angles[piece]) * Math.PI / 180;
            for (int i = 0; i < Fine.Nodes.Length; i++)
            {
                double angle = (angles[piece] * Math.PI / 180) + (step * Fine.Nodes[i]);
                points.Add((Math.Cos(angle), Math.Sin(angle) * step * Fine.Weights[i]));
            }
        }

        return points;
    }
}
