using MathNet.Numerics.Optimization;

namespace FilmDesign;

/// <summary>The film nearest to a white that cannot be reached: smallest distance in xy within the bounds, edges and corners included.</summary>
internal static class NearestWhite
{
    private const int EdgeSteps = 16;
    private const double LogTolerance = 1e-4; // The distance is flat at its least: this leaves about 1e-8 in xy.

    public static LoadingPoint Search(LoadingProblem problem, LoadingBox box, LoadingPoint best)
    {
        best = Better(best, Interior(problem, box, best));
        // Lower bounds are tried as they are: no dots at all is a film too, which the logarithm never reaches.
        best = Better(best, Edge(problem, box, 0, box.Min[0]));
        best = Better(best, Edge(problem, box, 0, box.Max[0]));
        best = Better(best, Edge(problem, box, 1, box.Min[1]));
        return Better(best, Edge(problem, box, 1, box.Max[1]));
    }

    private static LoadingPoint Better(LoadingPoint a, LoadingPoint b) => b.DistanceXy < a.DistanceXy ? b : a;

    // A simplex needs no derivatives, which the distance does not have at its bounds. Its best point counts, however it stopped.
    private static LoadingPoint Interior(LoadingProblem problem, LoadingBox box, LoadingPoint best)
    {
        try
        {
            NelderMeadSimplex.Minimum(
                ObjectiveFunction.Value(v => At(v[0], v[1])),
                MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(
                    [Math.Log(box.Clamp(0, best.FirstMgPerMl)), Math.Log(box.Clamp(1, best.SecondMgPerMl))]),
                convergenceTolerance: 1e-10,
                maximumIterations: 400);
        }
        catch (MaximumIterationsException)
        {
            // The edges are searched next, and the distance found so far is a true one.
        }

        return best;

        double At(double p, double q)
        {
            double first = box.Clamp(0, Math.Exp(p)), second = box.Clamp(1, Math.Exp(q));
            double distance = problem.DistanceAt(first, second);
            best = Better(best, new(first, second, distance));
            return distance;
        }
    }

    private static LoadingPoint Edge(LoadingProblem problem, LoadingBox box, int held, double heldMgPerMl)
    {
        int moving = 1 - held;
        double low = Math.Log(box.Floor[moving]), high = Math.Log(box.Max[moving]);
        var scan = Enumerable.Range(0, EdgeSteps + 1)
            .Select(i => At(low + ((high - low) * i / EdgeSteps)))
            .Append(AtLoading(box.Min[moving]))
            .ToArray();
        int at = Array.IndexOf(scan, scan.MinBy(point => point.DistanceXy));
        if (at > EdgeSteps || high - low < LogTolerance)
            return scan[at];
        double width = (high - low) / EdgeSteps;
        double centre = low + (at * width);
        double least = GoldenSection.Minimum(
            p => At(p).DistanceXy, Math.Max(low, centre - width), Math.Min(high, centre + width), LogTolerance);
        return Better(scan[at], At(least));

        LoadingPoint At(double logLoading) => AtLoading(Math.Min(Math.Exp(logLoading), box.Max[moving]));

        LoadingPoint AtLoading(double movingMgPerMl)
        {
            var (first, second) = held == 0 ? (heldMgPerMl, movingMgPerMl) : (movingMgPerMl, heldMgPerMl);
            return new(first, second, problem.DistanceAt(first, second));
        }
    }
}
