namespace FilmOptics.DiscreteOrdinates;

/// <summary>Light that total reflection keeps in: where nothing ends its flight within the sheet, it comes out at the edges.</summary>
/// <remarks>
/// A flight of extinction k is longer than the sheet's width W with the chance exp(−kW). A loss of k/(exp(kW) − 1) along the way
/// takes just that share of the flights; k is the mean along the path through all layers that the light visits.
/// </remarks>
internal static class GuidedLight<T>
    where T : struct, ILanes<T>
{
    /// <summary>Extinction × width beyond which no flight reaches the edges: exp(−40) is 4e-18.</summary>
    public const double OutOfReach = 40;

    /// <summary>1/mm, at [layer, node].</summary>
    public static LaneMatrix<T> EdgeLoss(FilmPlan plan, StateSolver<T>.Lanes lanes, double longestFlightMm, LaneArena<T> arena)
    {
        var loss = arena.TakeCleared(plan.Layers.Count, plan.Ordinates.Count);
        Span<double> numbers = stackalloc double[T.Count];
        for (int node = plan.AirCount; node < plan.Ordinates.Count; node++)
        {
            // Layers in which the node exists, side by side, share their light; a layer of lower index parts them.
            for (int first = 0; first < plan.Layers.Count; first++)
            {
                if (node >= plan.Nodes[first].Count)
                    continue;
                int last = first;
                T depth = default;
                double path = 0;
                for (; last < plan.Layers.Count && node < plan.Nodes[last].Count; last++)
                {
                    double way = plan.Layers[last].ThicknessMm / plan.Nodes[last].Cosine[node];
                    depth += (lanes.Absorption(last) + lanes.Scattering(last)) * T.All(way);
                    path += way;
                }

                for (int lane = 0; lane < T.Count; lane++)
                    numbers[lane] = Loss(depth[lane] / path, longestFlightMm);
                for (int layer = first; layer < last; layer++)
                    loss[layer, node] = T.Load(numbers);
                first = last;
            }
        }

        return loss;
    }

    private static double Loss(double extinctionPerMm, double longestFlightMm)
    {
        double depth = extinctionPerMm * longestFlightMm;
        return depth < 1e-6 ? 1 / longestFlightMm
            : depth > OutOfReach ? 0
            : extinctionPerMm / (Math.Exp(depth) - 1);
    }
}
