namespace FilmDesign;

/// <summary>The loadings a search may use: the target's bounds, and a scale below which a loading is as good as none.</summary>
internal sealed class LoadingBox
{
    // A loading of this share of optical depth 1 changes nothing that can be seen; logarithms need a floor.
    private const double FloorDepth = 1e-7;
    private const double UnboundedDepth = 1e3;
    private const double StartDepth = 0.3;
    private const int CoarseSteps = 7;
    private const double CoarseFirstDepth = 3e-3, CoarseLastDepth = 30;

    private LoadingBox(double[] minMgPerMl, double[] maxMgPerMl, double[] floorMgPerMl, double[] unitMgPerMl) =>
        (Min, Max, Floor, Unit) = (minMgPerMl, maxMgPerMl, floorMgPerMl, unitMgPerMl);

    /// <summary>Lower bounds, mg/mL.</summary>
    public double[] Min { get; }

    /// <summary>Upper bounds, mg/mL.</summary>
    public double[] Max { get; }

    /// <summary>Lowest loadings in logarithmic search, mg/mL.</summary>
    public double[] Floor { get; }

    /// <summary>Loadings of optical depth 1, mg/mL.</summary>
    public double[] Unit { get; }

    /// <summary>Where the search begins.</summary>
    public (double First, double Second) Start { get; private init; }

    public static LoadingBox Of(LoadingProblem problem)
    {
        var (min, max, floor, unit, start) = (new double[2], new double[2], new double[2], new double[2], new double[2]);
        for (int i = 0; i < 2; i++)
        {
            (min[i], max[i]) = (problem.Target.Free[i].MinMgPerMl, problem.Target.Free[i].MaxMgPerMl);
            unit[i] = Math.Min(problem.UnitDepthMgPerMl(i) ?? max[i], max[i]);
            floor[i] = Math.Max(min[i], unit[i] * FloorDepth);
            double wished = problem.StartMgPerMl(i) > floor[i] ? problem.StartMgPerMl(i) : unit[i] * StartDepth;
            start[i] = Math.Clamp(wished, floor[i], max[i]);
        }

        return new(min, max, floor, unit) { Start = (start[0], start[1]) };
    }

    /// <summary>No bounds but none: up to a depth at which no light is left.</summary>
    public static LoadingBox Unbounded(LoadingProblem problem)
    {
        double[] unit = [.. Enumerable.Range(0, 2).Select(i => problem.UnitDepthMgPerMl(i) ?? problem.Target.Free[i].MaxMgPerMl)];
        return new([0, 0], [.. unit.Select(u => u * UnboundedDepth)], [.. unit.Select(u => u * FloorDepth)], unit);
    }

    /// <summary>The loading with its bounds kept, mg/mL.</summary>
    public double Clamp(int free, double loadingMgPerMl) => Math.Clamp(loadingMgPerMl, Floor[free], Max[free]);

    /// <summary>The nearest whites of a coarse logarithmic grid over the box.</summary>
    public IEnumerable<(double First, double Second)> CoarseBest(LoadingProblem problem, int count)
    {
        var found = new List<(double Distance, double First, double Second)>();
        for (int i = 0; i < CoarseSteps; i++)
        {
            for (int j = 0; j < CoarseSteps; j++)
            {
                double first = Clamp(0, Unit[0] * Depth(i)), second = Clamp(1, Unit[1] * Depth(j));
                found.Add((problem.DistanceAt(first, second), first, second));
            }
        }

        return found.OrderBy(f => f.Distance).Take(count).Select(f => (f.First, f.Second));

        static double Depth(int step) =>
            CoarseFirstDepth * Math.Pow(CoarseLastDepth / CoarseFirstDepth, step / (CoarseSteps - 1.0));
    }
}
