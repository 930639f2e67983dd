using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>What a film does over the loadings of its two free lots: a grid around the loadings of the file, on any model.</summary>
/// <param name="FirstLot">The lot across.</param>
/// <param name="SecondLot">The lot upward.</param>
/// <param name="FirstMgPerMl">Its loadings, rising, mg/mL.</param>
/// <param name="SecondMgPerMl">The other's, mg/mL.</param>
/// <param name="Points">What the film does at [index of the first, index of the second].</param>
/// <param name="StandardName">The standard whose coverage is given; null without a panel.</param>
public sealed record LoadingMap(
    string FirstLot,
    string SecondLot,
    IReadOnlyList<double> FirstMgPerMl,
    IReadOnlyList<double> SecondMgPerMl,
    IReadOnlyList<IReadOnlyList<LoadingMapPoint>> Points,
    string? StandardName)
{
    // From half of the file's loading to one and a half times: the neighbourhood that a coater corrects within.
    private const double LeastFactor = 0.5, MostFactor = 1.5;

    /// <summary>Solves every film of the grid.</summary>
    /// <param name="filmCase">The film file; its target names two free lots, each with a loading above 0.</param>
    /// <param name="model">Any model.</param>
    /// <param name="steps">Loadings of each lot, 2 to 101.</param>
    /// <param name="progressShare">Told the share of films that are solved, 0…1.</param>
    /// <param name="cancellationToken">Stops between films, and within one where the model can.</param>
    /// <exception cref="InputException">No target, not two free lots, or one of them without a loading.</exception>
    public static LoadingMap Compute(
        FilmCase filmCase, IFilmModel model, int steps = 11, IProgress<double>? progressShare = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(model);
        ArgumentOutOfRangeException.ThrowIfLessThan(steps, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(steps, 101);
        var problem = new LoadingProblem(filmCase, model, cancellationToken);
        double[] first = Range(problem, 0, steps), second = Range(problem, 1, steps);
        var points = new LoadingMapPoint[steps][];
        string? standard = null;
        for (int i = 0; i < steps; i++)
        {
            points[i] = new LoadingMapPoint[steps];
            for (int j = 0; j < steps; j++)
            {
                cancellationToken.ThrowIfCancellationRequested();
                (points[i][j], standard) = At(problem, first[i], second[j]);
                progressShare?.Report(((i * steps) + j + 1.0) / (steps * steps));
            }
        }

        return new(problem.Target.Free[0].LotName, problem.Target.Free[1].LotName, first, second, points, standard);
    }

    private static (LoadingMapPoint Point, string? Standard) At(LoadingProblem problem, double firstMgPerMl, double secondMgPerMl)
    {
        var output = problem.OutputAt(firstMgPerMl, secondMgPerMl);
        var solved = problem.FilmCase with { Film = problem.FilmAt(firstMgPerMl, secondMgPerMl) };
        var appraisal = FilmAppraiser.Appraise(solved, output);
        var standard = appraisal.Gamut is { Count: > 0 } gamut ? gamut[0] : null;
        return (new(problem.ChromaticityOf(output), output.Budget.Unconverted, standard?.CoverageXy), standard?.Name);
    }

    private static double[] Range(LoadingProblem problem, int free, int steps)
    {
        var bounds = problem.Target.Free[free];
        double startMgPerMl = problem.StartMgPerMl(free);
        if (!(startMgPerMl > 0))
            throw new InputException(new InputFault(problem.FilmCase.Film.Title, null, null, $"lot '{bounds.LotName}' has a loading of 0; a loading map needs one above 0 to look around, such as that which formulate finds."));
        double from = Math.Max(bounds.MinMgPerMl, startMgPerMl * LeastFactor), to = Math.Min(bounds.MaxMgPerMl, startMgPerMl * MostFactor);
        if (!(to > from))
            throw new InputException(new InputFault(problem.FilmCase.Film.Title, null, null, $"target.free holds lot '{bounds.LotName}' at one loading; a loading map needs bounds that let it move."));
        return [.. Enumerable.Range(0, steps).Select(i => from + ((to - from) * i / (steps - 1)))];
    }
}

/// <summary>A film of a loading map.</summary>
/// <param name="White">White where the target judges it.</param>
/// <param name="LeakageShare">Source photons that leave above unconverted.</param>
/// <param name="CoverageXyShare">Coverage of the first standard by the panel, in xy; null without a panel.</param>
public sealed record LoadingMapPoint(Chromaticity White, double LeakageShare, double? CoverageXyShare);
