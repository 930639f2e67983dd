namespace FilmOptics.DiscreteOrdinates;

/// <summary>A layer that does not scatter: each direction by itself, in closed form.</summary>
internal static class ClearLayer<T>
    where T : struct, ILanes<T>
{
    public static LayerBlock<T> Build(LaneArena<T> arena, LayerOrdinates nodes, LayerOptics<T> optics, double cellMm, int cells)
    {
        int n = nodes.Count, ports = cells + (optics.EdgeLoss.Length > 0 ? 1 : 0);
        var result = arena.TakeCleared(n + ports, n + ports);
        var through = arena.TakeCleared(n, n + ports);
        Span<double> pass = stackalloc double[T.Count], mean = stackalloc double[T.Count], self = stackalloc double[T.Count];
        for (int j = 0; j < n; j++)
        {
            T loss = ports > cells ? optics.EdgeLoss[j] : default;
            T depth = (optics.Absorption + loss) * T.All(cellMm / nodes.Cosine[j]);
            for (int lane = 0; lane < T.Count; lane++)
                (pass[lane], mean[lane], self[lane]) = Decay(depth[lane]);
            T step = T.Load(pass);

            // One cell's emission out of its own face, and the fluence it leaves in itself, one way.
            T u = T.All(nodes.FluenceRoot[j]);
            T outOf = u * T.All(cellMm) * T.Load(mean);
            T within = T.All(2 * cellMm * cellMm) * u * u * T.Load(self);
            T far = T.All(1);
            for (int distance = 0; distance < cells; distance++)
            {
                T shared = distance == 0 ? within : outOf * outOf * far;
                if (distance > 0)
                    far *= step;
                T leaving = outOf * far;
                result[j, n + distance] = result[n + distance, j] = through[j, n + cells - 1 - distance] = leaving;
                for (int cell = 0; cell + distance < cells; cell++)
                {
                    int other = cell + distance;
                    result[n + cell, n + other] += shared;
                    if (distance > 0)
                        result[n + other, n + cell] += shared;
                    if (ports == cells)
                        continue;

                    // What either cell sends into the other is guided light that the edges take a share of.
                    result[n + cell, n + cells] += loss * shared;
                    if (distance > 0)
                        result[n + other, n + cells] += loss * shared;
                }

                if (ports > cells)
                    result[j, n + cells] = through[j, n + cells] = result[j, n + cells] + (loss * leaving);
            }

            through[j, j] = far * step;
        }

        for (int port = n + cells; port < n + ports; port++)
        {
            for (int row = 0; row < port; row++)
                result[port, row] = result[row, port];
        }

        return new() { Base = result, Through = through, Nodes = n, Ports = ports };
    }

    // exp(−t), its mean over the cell (1 − exp(−t))/t, and what stays on the way out: (t − 1 + exp(−t))/t².
    private static (double Pass, double Mean, double Self) Decay(double t)
    {
        double pass = Math.Exp(-t);
        if (t < 1e-2)
            return (pass, 1 - (t / 2 * (1 - (t / 3 * (1 - (t / 4 * (1 - (t / 5))))))), 0.5 - (t / 6 * (1 - (t / 4 * (1 - (t / 5 * (1 - (t / 6))))))));
        double mean = (1 - pass) / t;
        return (pass, mean, (1 - mean) / t);
    }
}
