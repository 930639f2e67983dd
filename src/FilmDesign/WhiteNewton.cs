using Colorimetry;

namespace FilmDesign;

/// <summary>Damped Newton (Levenberg–Marquardt in two dimensions) on the logarithms of X/Y and Z/Y over those of the loadings.</summary>
internal static class WhiteNewton
{
    private const int MaxIterations = 40;

    // A factor of e² a step: far enough to cross decades, near enough not to leave the region where the film still glows.
    private const double MaxLogStep = 2;

    public static LoadingPoint Run(LoadingProblem problem, LoadingBox box, (double First, double Second) start)
    {
        double p = Math.Log(start.First), q = Math.Log(start.Second), damping = 1e-8;
        if (problem.WhiteAt(start.First, start.Second) is not { } first)
            return new(start.First, start.Second, 2);
        var (r0, r1) = Residual(first, problem.Wanted);
        double distance = first.Chromaticity.DistanceXyTo(problem.Wanted);
        for (int iteration = 0; iteration < MaxIterations && distance > problem.AimXy && damping < 1e8; iteration++)
        {
            if (Slope(problem, p + Towards(problem, box, 0, p), q, p, q, r0, r1) is not { } a
                || Slope(problem, p, q + Towards(problem, box, 1, q), p, q, r0, r1) is not { } b)
            {
                break;
            }

            bool improved = false;
            while (!improved && damping < 1e8)
            {
                var (dp, dq) = Step(a, b, r0, r1, damping);
                double triedP = Math.Log(box.Clamp(0, Math.Exp(p + Math.Clamp(dp, -MaxLogStep, MaxLogStep))));
                double triedQ = Math.Log(box.Clamp(1, Math.Exp(q + Math.Clamp(dq, -MaxLogStep, MaxLogStep))));
                var white = problem.WhiteAt(Math.Exp(triedP), Math.Exp(triedQ));
                var (t0, t1) = white is { } w ? Residual(w, problem.Wanted) : (1e9, 1e9);
                improved = (t0 * t0) + (t1 * t1) < (r0 * r0) + (r1 * r1);
                if (improved)
                {
                    (p, q, r0, r1, damping) = (triedP, triedQ, t0, t1, Math.Max(damping / 10, 1e-12));
                    distance = white!.Value.Chromaticity.DistanceXyTo(problem.Wanted);
                }
                else
                {
                    damping = Math.Max(damping * 10, 1e-6);
                }
            }

            if (!improved)
                break;
        }

        return new(Math.Exp(p), Math.Exp(q), distance);
    }

    private static (double XOverY, double ZOverY) Residual(Tristimulus white, Chromaticity wanted)
    {
        // A film without blue or without red light has no logarithm; the floor keeps such points comparable.
        double x = Math.Max(white.X / white.Y, 1e-9), z = Math.Max(white.Z / white.Y, 1e-9);
        return (Math.Log(x * wanted.Y / wanted.X), Math.Log(z * wanted.Y / Math.Max(1 - wanted.X - wanted.Y, 1e-9)));
    }

    // Differences go away from a bound, so that they never leave the box.
    private static double Towards(LoadingProblem problem, LoadingBox box, int free, double logLoading) =>
        Math.Exp(logLoading + problem.DerivativeStep) <= box.Max[free] ? problem.DerivativeStep : -problem.DerivativeStep;

    private static (double Ofx, double Ofz)? Slope(LoadingProblem problem, double p, double q, double p0, double q0, double r0, double r1)
    {
        if (problem.WhiteAt(Math.Exp(p), Math.Exp(q)) is not { } white)
            return null;
        var (x, z) = Residual(white, problem.Wanted);
        double step = (p - p0) + (q - q0);
        return ((x - r0) / step, (z - r1) / step);
    }

    // (JᵀJ + damping · diag(JᵀJ)) d = −Jᵀr
    private static (double Dp, double Dq) Step((double X, double Z) a, (double X, double Z) b, double r0, double r1, double damping)
    {
        double aa = (a.X * a.X) + (a.Z * a.Z), bb = (b.X * b.X) + (b.Z * b.Z), ab = (a.X * b.X) + (a.Z * b.Z);
        double ga = (a.X * r0) + (a.Z * r1), gb = (b.X * r0) + (b.Z * r1);
        double m = (aa * (1 + damping)) + 1e-300, n = (bb * (1 + damping)) + 1e-300;
        double determinant = (m * n) - (ab * ab);
        return determinant > 0 ? (((gb * ab) - (ga * n)) / determinant, ((ga * ab) - (gb * m)) / determinant) : (-ga / m, -gb / n);
    }
}
