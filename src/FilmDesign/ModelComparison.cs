using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>The models side by side on one film, what each feature that the quick model leaves out is worth, and what would mend the quick model.</summary>
public sealed record ModelComparison
{
    // A difference of this many combined standard errors is noise; beyond it something else.
    private const double ExplainedStandardErrors = 4;
    private const double LongestPathFactor = 30;

    /// <summary>One appraisal per model; the first is the reference that the others are compared with.</summary>
    public required IReadOnlyList<FilmAppraisal> Models { get; init; }

    /// <summary>Every figure of every other model beside the reference.</summary>
    public required IReadOnlyList<FigureDifference> Differences { get; init; }

    /// <summary>The reference with one feature taken away at a time.</summary>
    public required IReadOnlyList<FeatureEffect> Features { get; init; }

    /// <summary>
    /// Path lengths with which the quick model gives the reference's unconverted share, and then comes nearest to its white; null where
    /// no pump path gives that share.
    /// </summary>
    public required BeerLambertPaths SuggestedPaths { get; init; }

    /// <summary>How far the quick model's white is then from the reference's, in u′v′; null where there are no such paths.</summary>
    public required double? SuggestedWhiteErrorUv { get; init; }

    /// <summary>Compares.</summary>
    /// <param name="filmCase">The film.</param>
    /// <param name="reference">The model that the others are compared with, and that features are taken away from.</param>
    /// <param name="others">The other models.</param>
    /// <param name="cancellationToken">Stops long work.</param>
    public static ModelComparison Of(
        FilmCase filmCase, IFilmModel reference, IReadOnlyList<IFilmModel> others, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(reference);
        ArgumentNullException.ThrowIfNull(others);
        var exact = Appraise(filmCase, reference, cancellationToken);
        var (paths, whiteErrorUv) = Paths(filmCase, exact, cancellationToken);
        FilmAppraisal[] models = [exact, .. others.Select(model => Appraise(filmCase, model, cancellationToken))];
        return new ModelComparison
        {
            Models = models,
            Differences = [.. models.Skip(1).SelectMany(model => DifferencesOf(filmCase, exact, model))],
            Features = [.. FilmFeatures.Without(filmCase.Film).Select(f => Effect(filmCase, f.Name, f.Film, exact, reference, cancellationToken))],
            SuggestedPaths = paths,
            SuggestedWhiteErrorUv = whiteErrorUv,
        };
    }

    /// <summary>White where the film file judges it: the panel's if there is one and the target does not say film.</summary>
    public static Chromaticity JudgedWhite(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return appraisal.Panel is { } panel && filmCase.Target?.Place != TargetPlace.Film
            ? panel.White.Chromaticity
            : appraisal.FilmWhite.Chromaticity;
    }

    // Colours of every model are those of the flux: the quick model has no radiance along the normal.
    private static FilmAppraisal Appraise(FilmCase filmCase, IFilmModel model, CancellationToken cancellationToken)
    {
        var flux = filmCase.Target is { } target ? filmCase with { Target = target with { View = TargetView.Hemisphere } } : filmCase;
        return FilmAppraiser.Appraise(flux, model.Solve(filmCase.Film, cancellationToken));
    }

    private static IEnumerable<FigureDifference> DifferencesOf(FilmCase filmCase, FilmAppraisal reference, FilmAppraisal model)
    {
        foreach (var (quantity, read) in Shares())
        {
            double expected = read(reference.Output.Budget), found = read(model.Output.Budget);
            double? error = StatedError(reference.Output, read) is { } a && StatedError(model.Output, read) is { } b ? a + b : null;
            yield return new(model.Output.Model, quantity, expected, found, error);
        }

        var (white, other) = (JudgedWhite(filmCase, reference), JudgedWhite(filmCase, model));
        yield return new(model.Output.Model, "u_prime", white.UPrime, other.UPrime, null);
        yield return new(model.Output.Model, "v_prime", white.VPrime, other.VPrime, null);
    }

    private static double? StatedError(FilmOutput output, Func<PhotonBudget, double> read) =>
        output.Accuracy?.EstimateShare ?? (output.Tracing is { } tracing ? ExplainedStandardErrors * read(tracing.StandardError) : null);

    private static IEnumerable<(string Quantity, Func<PhotonBudget, double> Read)> Shares()
    {
        yield return ("unconverted", b => b.Unconverted);
        yield return ("converted", b => b.Converted);
        yield return ("lost_below", b => b.LostBelow);
        yield return ("lost_above", b => b.LostAbove);
        yield return ("lost_in_host", b => b.LostInHost);
        yield return ("lost_at_edges", b => b.LostAtEdges);
        yield return ("lost_in_lots", b => b.LostInLots.Sum());
    }

    private static FeatureEffect Effect(
        FilmCase filmCase, string name, Film without, FilmAppraisal full, IFilmModel model, CancellationToken cancellationToken)
    {
        var appraisal = Appraise(filmCase with { Film = without }, model, cancellationToken);
        var (white, other) = (JudgedWhite(filmCase, full), JudgedWhite(filmCase, appraisal));
        return new(name, appraisal.Output.Budget.Unconverted, appraisal.Output.Budget.Converted, other, white.DistanceUvTo(other));
    }

    // Unconverted light hangs on the pump path alone, and falls with it; the emission path then shifts light from green to red.
    private static (BeerLambertPaths Paths, double? WhiteErrorUv) Paths(FilmCase filmCase, FilmAppraisal exact, CancellationToken cancellationToken)
    {
        var (film, quick, wanted) = (filmCase.Film, new BeerLambertModel(), JudgedWhite(filmCase, exact));
        if (Factor(p => quick.Solve(With(p, 1), cancellationToken).Budget.Unconverted - exact.Output.Budget.Unconverted) is not { } pumpFactor)
            return (new(null, null), null);
        double emissionFactor = GoldenSection.Minimum(WhiteErrorUv, 1, LongestPathFactor, 1e-3);
        return (new(pumpFactor, emissionFactor), WhiteErrorUv(emissionFactor));

        Film With(double pump, double emission) => film with { BeerLambertPaths = new(pump, emission) };

        double WhiteErrorUv(double emission) =>
            wanted.DistanceUvTo(JudgedWhite(filmCase, Appraise(filmCase with { Film = With(pumpFactor, emission) }, quick, cancellationToken)));
    }

    private static double? Factor(Func<double, double> excess)
    {
        double low = 1, high = LongestPathFactor;
        if (!(excess(low) >= 0) || !(excess(high) <= 0))
            return null;
        while (high - low > 1e-6)
        {
            double middle = (low + high) / 2;
            (low, high) = excess(middle) > 0 ? (middle, high) : (low, middle);
        }

        return (low + high) / 2;
    }
}

/// <summary>One figure of a model beside the reference.</summary>
/// <param name="Model">The model.</param>
/// <param name="Quantity">Key of the figure in the JSON document.</param>
/// <param name="ReferenceValue">The reference's figure.</param>
/// <param name="Value">The model's figure.</param>
/// <param name="StatedErrorShare">What both models state as their error together; null where one states none.</param>
public sealed record FigureDifference(string Model, string Quantity, double ReferenceValue, double Value, double? StatedErrorShare)
{
    /// <summary>Model less reference.</summary>
    public double Difference => Value - ReferenceValue;

    /// <summary>Whether the stated errors explain the difference; null where one model states none.</summary>
    public bool? IsExplained => StatedErrorShare is { } error ? Math.Abs(Difference) <= error : null;
}

/// <summary>The reference with one feature of the film taken away.</summary>
/// <param name="Feature">What was taken away.</param>
/// <param name="Unconverted">Unconverted share then.</param>
/// <param name="Converted">Converted share then.</param>
/// <param name="White">White then.</param>
/// <param name="WhiteShiftUv">How far white moved, in u′v′.</param>
public sealed record FeatureEffect(string Feature, double Unconverted, double Converted, Chromaticity White, double WhiteShiftUv);
