using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>Finds the loadings of two lots that put white on its target, on any model.</summary>
/// <remarks>
/// A damped Newton method in the logarithms of the loadings on the logarithms of X/Y and Z/Y, in which a film is nearly linear.
/// Where it fails from the file's loadings it starts again from the best points of a coarse grid; where no start leads to the target,
/// the nearest film within the bounds is found, edges and corners included, and the reason named.
/// </remarks>
public static class LoadingSolver
{
    /// <summary>Solves.</summary>
    /// <param name="filmCase">The film file; its target names two free lots.</param>
    /// <param name="model">Any model.</param>
    /// <param name="cancellationToken">Stops long work.</param>
    /// <exception cref="InputException">No target, or not two free lots.</exception>
    /// <exception cref="NumericalFailureException">The model fails.</exception>
    public static Formulation Formulate(FilmCase filmCase, IFilmModel model, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(model);
        var problem = new LoadingProblem(filmCase, model, cancellationToken);
        var box = LoadingBox.Of(problem);
        var best = Best(problem, box, new(box.Start.First, box.Start.Second, double.MaxValue));
        return Outcome(problem, best);
    }

    /// <summary>The point on target that a search from a start finds, or the nearest there is within a box.</summary>
    internal static LoadingPoint Best(LoadingProblem problem, LoadingBox box, LoadingPoint start)
    {
        var best = WhiteNewton.Run(problem, box, (box.Clamp(0, start.FirstMgPerMl), box.Clamp(1, start.SecondMgPerMl)));
        if (best.DistanceXy > problem.EnoughXy)
        {
            foreach (var coarse in box.CoarseBest(problem, count: 3))
            {
                var tried = WhiteNewton.Run(problem, box, coarse);
                if (tried.DistanceXy < best.DistanceXy)
                    best = tried;
                if (best.DistanceXy <= problem.EnoughXy)
                    break;
            }
        }

        return best.DistanceXy > problem.EnoughXy ? NearestWhite.Search(problem, box, best) : best;
    }

    private static Formulation Outcome(LoadingProblem problem, LoadingPoint best)
    {
        var film = problem.FilmAt(best.FirstMgPerMl, best.SecondMgPerMl);
        var output = problem.OutputAt(best.FirstMgPerMl, best.SecondMgPerMl);
        var solved = problem.FilmCase with { Film = film };
        bool reached = best.DistanceXy <= problem.Target.ToleranceXy;
        return new Formulation
        {
            FilmCase = solved,
            Appraisal = FilmAppraiser.Appraise(solved, output),
            Loadings =
            [
                .. film.Layers.SelectMany(layer => layer.Dots
                    .Where(dots => problem.Target.Free.Any(free => free.LotName == dots.Lot.Name))
                    .Select(dots => new SolvedLoading(dots.Lot.Name, layer.Name, dots.LoadingMgPerMl))),
            ],
            Reached = reached,
            WhiteErrorXy = best.DistanceXy,
            Limit = reached ? null : LoadingLimit.Explain(problem, best, output),
            Solves = problem.Solves,
        };
    }
}

/// <summary>Two loadings and how far white is from its target there.</summary>
internal readonly record struct LoadingPoint(double FirstMgPerMl, double SecondMgPerMl, double DistanceXy);
