using System.Collections.Concurrent;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>What serves every film of one shape: plans by effort, and tables over the absorption of its one varying layer.</summary>
/// <param name="shape">The shape.</param>
/// <param name="withAngles">Whether radiance against angle is wanted.</param>
/// <param name="largestTailShare">What a table's polynomials may leave out.</param>
internal sealed class StoredShape(FilmShape shape, bool withAngles, double largestTailShare)
{
    // Dense films that let little light out miss about a twentieth of the tail (measured), and that much may change its colour.
    private const double TailPerLight = 100;

    // a₀ × thickness and nodes, tried in this order: most films are smooth on the first, bright cavities and clear hosts on a later one.
    private static readonly (double OffsetDepth, int Nodes)[] Axes = [(0.03, 16), (0.03, 24), (0.003, 32), (0.0003, 40)];

    private readonly ConcurrentDictionary<Effort, FilmPlan> _plans = new();
    private readonly ConcurrentDictionary<double, AbsorptionAxis?> _axes = new();
    private readonly ConcurrentDictionary<(Effort Effort, AbsorptionAxis Axis), FilmKernels> _tables = new();

    public FilmShape Shape { get; } = shape;

    /// <summary>Directions and cells at an effort.</summary>
    public FilmPlan Plan(Film film, IReadOnlyList<MergedLayer> layers, Effort effort) =>
        _plans.TryGetValue(effort, out var known) ? known : _plans.GetOrAdd(effort, new FilmPlan(film, layers, effort, withAngles));

    /// <summary>The axis on which a film lies; null where more than one layer's absorption varies, or where no polynomial follows the film.</summary>
    /// <param name="film">The film.</param>
    /// <param name="layers">Its layers.</param>
    /// <param name="largestPerMm">Largest absorption of the varying layer, 1/mm.</param>
    /// <param name="effort">The effort that is wanted first.</param>
    /// <param name="cancellationToken">Stops long work.</param>
    public AbsorptionAxis? Axis(
        Film film, IReadOnlyList<MergedLayer> layers, double largestPerMm, Effort effort, CancellationToken cancellationToken)
    {
        if (Shape.VaryingLayer is not { } varying)
            return null;
        double range = AbsorptionAxis.RangeFor(largestPerMm);
        if (_axes.TryGetValue(range, out var known))
            return known;
        AbsorptionAxis? found = null;
        foreach (var (offsetDepth, nodes) in Axes)
        {
            var axis = new AbsorptionAxis(varying, range, offsetDepth / layers[varying].ThicknessMm, nodes);
            var table = Solve(film, layers, Plan(film, layers, effort), axis, cancellationToken);
            if (axis.Judge(table.Answers) > largestTailShare)
                continue;
            _tables.TryAdd((effort, axis), table);
            found = axis;
            break;
        }

        return _axes.GetOrAdd(range, found);
    }

    /// <summary>Whether a table is good enough for the colour of so little light.</summary>
    /// <param name="axis">Its axis.</param>
    /// <param name="lightShare">Light that leaves above, per source photon.</param>
    public bool Suffices(AbsorptionAxis axis, double lightShare) => axis.Tail <= TailPerLight * largestTailShare * lightShare;

    /// <summary>The table over an axis.</summary>
    public FilmKernels Table(
        Film film, IReadOnlyList<MergedLayer> layers, Effort effort, AbsorptionAxis axis, CancellationToken cancellationToken) =>
        _tables.TryGetValue((effort, axis), out var known)
            ? known
            : _tables.GetOrAdd((effort, axis), Solve(film, layers, Plan(film, layers, effort), axis, cancellationToken));

    private static FilmKernels Solve(
        Film film, IReadOnlyList<MergedLayer> layers, FilmPlan plan, AbsorptionAxis axis, CancellationToken cancellationToken)
    {
        var states = OpticalStates.At(film, layers, new int[axis.Nodes]);
        axis.NodesPerMm().CopyTo(states.Absorption[axis.Layer], 0);
        var answers = new double[axis.Nodes * plan.Rows * plan.Inputs];
        StateSolver<WideLanes>.Solve(plan, states, film.Cavity.BypassShare, states.LongestFlightMm(film, layers), answers, cancellationToken);
        return new FilmKernels(plan, axis.Nodes, answers);
    }
}
