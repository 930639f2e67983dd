namespace FilmOptics.DiscreteOrdinates;

/// <summary>Gauss–Legendre nodes on the unit interval.</summary>
internal static class GaussLegendre
{
    /// <summary>Nodes, rising in 0…1, and weights that sum to 1; exact for polynomials up to degree 2 × count − 1.</summary>
    public static (double[] Nodes, double[] Weights) OnUnitInterval(int count)
    {
        var (nodes, weights) = (new double[count], new double[count]);
        for (int i = 0; i < count; i++)
        {
            // Tricomi's first guess, then Newton steps on the Legendre recurrence.
            double x = Math.Cos(Math.PI * (i + 0.75) / (count + 0.5));
            double slope = 1;
            for (int step = 0; step < 100; step++)
            {
                (double value, slope) = Legendre(count, x);
                double correction = value / slope;
                x -= correction;
                if (Math.Abs(correction) < 1e-15)
                    break;
            }

            nodes[count - 1 - i] = (1 + x) / 2;
            weights[count - 1 - i] = 1 / ((1 - (x * x)) * slope * slope);
        }

        return (nodes, weights);
    }

    private static (double Value, double Slope) Legendre(int degree, double x)
    {
        (double before, double value) = (1, x);
        for (int l = 2; l <= degree; l++)
            (before, value) = (value, ((((2 * l) - 1) * x * value) - ((l - 1) * before)) / l);
        return (value, degree * ((x * value) - before) / ((x * x) - 1));
    }
}
