using FilmOptics.DiscreteOrdinates;

namespace FilmOptics;

/// <summary>The exact model: discrete ordinates through any layers, with every generation of re-emission in one solve.</summary>
public sealed class DiscreteOrdinatesModel : IFilmModel
{
    private const double BudgetShare = 1e-10;
    private const double GuidedWorthAWarningShare = 1e-4;

    // The finer of two efforts is within this many of their differences of the truth in at least 95 of 100 random films (tests); never less than rounding.
    private const double EstimateFactor = 3, RoundingShare = 1e-12;

    // Measured: sums over a spectrum miss a third of the tail of a table's polynomials at worst, a hundredth or less mostly.
    private const double TailOfAccuracy = 0.1;

    private static readonly Effort[] Quick = [new(4, 4, 10), new(6, 8, 8), new(8, 8, 5), new(10, 16, 3), new(16, 32, 1)];
    private static readonly Effort[] Fine = [new(7, 4, 6), new(9, 8, 5), new(12, 16, 3), new(16, 32, 1)];

    // From here on the quick efforts would only be waste.
    private const double FineFromShare = 5e-5;
    private readonly KernelStore _store;
    private readonly double _accuracyShare;
    private readonly bool _withAngles;
    private readonly Effort[] _efforts;

    /// <summary>A solver.</summary>
    /// <param name="accuracyShare">Largest error wanted in any budget line and in u′v′: 1e-5 to 1e-2.</param>
    /// <param name="withAngles">Whether radiance against the exit angle is wanted too.</param>
    public DiscreteOrdinatesModel(double accuracyShare = 3e-4, bool withAngles = false)
    {
        if (!(accuracyShare is >= 1e-5 and <= 1e-2))
            throw new ArgumentOutOfRangeException(nameof(accuracyShare), accuracyShare, "The accuracy has to lie between 1e-5 and 1e-2.");
        (_accuracyShare, _withAngles, _store) = (accuracyShare, withAngles, new KernelStore(withAngles, TailOfAccuracy * accuracyShare));
        _efforts = accuracyShare < FineFromShare ? Fine : Quick;
    }

    /// <inheritdoc/>
    public string Name => "discrete-ordinates";

    /// <inheritdoc/>
    public FilmOutput Solve(Film film, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        var layers = MergedLayer.Of(film);
        var shape = _store.ShapeOf(film, layers);
        var solver = _store.TakeSolver(film, layers);
        solver.Load(film, layers, shape, _efforts[0], cancellationToken);
        FilmOutput? coarse = null;
        foreach (var effort in _efforts)
        {
            var fine = solver.Solve(film, layers, shape, effort, Name, cancellationToken);
            if (coarse is not null)
            {
                double estimate = (EstimateFactor * OutputError.Between(coarse, fine)) + RoundingShare;
                if (estimate <= _accuracyShare || effort == _efforts[^1])
                {
                    int states = solver.States;
                    _store.GiveBack(solver);
                    return Finish(film, fine, effort, states, estimate);
                }
            }

            coarse = fine;
        }

        throw new NumericalFailureException("No effort is set.");
    }

    internal FilmOutput SolveAt(Film film, Effort effort, CancellationToken cancellationToken)
    {
        var layers = MergedLayer.Of(film);
        var shape = _store.ShapeOf(film, layers);
        var solver = _store.TakeSolver(film, layers);
        solver.Load(film, layers, shape, effort, cancellationToken);
        return solver.Solve(film, layers, shape, effort, Name, cancellationToken);
    }

    private FilmOutput Finish(Film film, FilmOutput output, Effort effort, int states, double estimate)
    {
        List<string> warnings = [];
        if (!(estimate <= _accuracyShare))
            warnings.Add(FormattableString.Invariant($"The accuracy of {_accuracyShare:g1} asked for was not reached: the estimate is {estimate:g1}."));
        if (output.Budget.LostAtEdges > GuidedWorthAWarningShare)
            warnings.Add(FormattableString.Invariant($"{100 * output.Budget.LostAtEdges:0.##} % of the source photons are guided to the edges, because nothing in the film ends them sooner. Any real film scatters a little: give scattering_per_mm a value above 0."));
        if (_withAngles && film.Backlight.Incidence.Kind == IncidenceKind.Normal)
            warnings.Add("Light against angle leaves out the collimated beam and its reflections: it has no radiance.");
        output.Budget.RequireClosed(BudgetShare);
        return output with
        {
            Warnings = warnings,
            Accuracy = new(_accuracyShare, estimate, 2 * effort.Ordinates, effort.Cells, states),
        };
    }
}
