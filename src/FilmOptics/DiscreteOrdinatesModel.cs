using Colorimetry;
using FilmOptics.DiscreteOrdinates;

namespace FilmOptics;

/// <summary>The exact model: discrete ordinates through any layers, with every generation of re-emission in one solve.</summary>
public sealed class DiscreteOrdinatesModel : IFilmModel
{
    private const double BudgetShare = 1e-10;
    private const double GuidedWorthAWarningShare = 1e-4;

    // The finer of two efforts is within this many of their differences of the truth in at least 95 of 100 random films (tests); never less than rounding.
    private const double EstimateFactor = 3, RoundingShare = 1e-12;
    private static readonly Effort[] Efforts = [new(4, 8), new(6, 8), new(8, 16), new(12, 16), new(16, 32)];
    private readonly double _accuracyShare;
    private readonly bool _withAngles;

    /// <summary>A solver.</summary>
    /// <param name="accuracyShare">Largest error wanted in any budget line and in u′v′: 1e-5 to 1e-2.</param>
    /// <param name="withAngles">Whether radiance against the exit angle is wanted too.</param>
    public DiscreteOrdinatesModel(double accuracyShare = 3e-4, bool withAngles = false)
    {
        if (!(accuracyShare is >= 1e-5 and <= 1e-2))
            throw new ArgumentOutOfRangeException(nameof(accuracyShare), accuracyShare, "The accuracy has to lie between 1e-5 and 1e-2.");
        (_accuracyShare, _withAngles) = (accuracyShare, withAngles);
    }

    /// <inheritdoc/>
    public string Name => "discrete-ordinates";

    /// <inheritdoc/>
    public FilmOutput Solve(Film film, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        FilmOutput? coarse = null;
        foreach (var effort in Efforts)
        {
            var fine = SolveAt(film, effort, cancellationToken);
            if (coarse is not null)
            {
                double estimate = (EstimateFactor * OutputError.Between(coarse, fine)) + RoundingShare;
                if (estimate <= _accuracyShare || effort == Efforts[^1])
                    return Finish(film, fine, effort, estimate);
            }

            coarse = fine;
        }

        throw new NumericalFailureException("No effort is set.");
    }

    internal FilmOutput SolveAt(Film film, Effort effort, CancellationToken cancellationToken)
    {
        var layers = MergedLayer.Of(film);
        var spectra = new FilmSpectra(film, layers);
        var plan = new FilmPlan(film, layers, effort, _withAngles);
        var weights = StateWeights.Each(spectra.Bins.Length);
        var states = new OpticalStates(layers.Count, spectra.Bins.Length);
        for (int layer = 0; layer < layers.Count; layer++)
        {
            spectra.Absorption[layer].CopyTo(states.Absorption[layer], 0);
            spectra.At(layers[layer].Layer.Scattering).CopyTo(states.Scattering[layer], 0);
            spectra.At(layers[layer].Layer.Anisotropy).CopyTo(states.Anisotropy[layer], 0);
        }

        spectra.At(film.Cavity.BelowReflectance).CopyTo(states.BelowReflectance, 0);
        spectra.At(film.Cavity.AboveReflectance).CopyTo(states.AboveReflectance, 0);
        spectra.At(film.Cavity.AboveAbsorptance).CopyTo(states.AboveAbsorptance, 0);
        RequireAnEnd(film, spectra, states);
        double longest = LongestFlightMm(film, layers, states);
        var answers = new double[states.Count * plan.Rows * plan.Inputs];
        StateSolver<WideLanes>.Solve(plan, states, film.Cavity.BypassShare, longest, new LaneArena<WideLanes>(), answers, cancellationToken);
        RequireNumbers(spectra, answers);
        var reemission = new Reemission(plan, spectra, weights, answers);
        double[] excitations = reemission.Excitations(out _);
        return new OutputBuilder(film, plan, spectra, weights, reemission).Build(excitations, Name);
    }

    // Light that nothing ends has no answer: the geometric series of the returns diverges.
    private static void RequireAnEnd(Film film, FilmSpectra spectra, OpticalStates states)
    {
        for (int state = 0; state < states.Count; state++)
        {
            if (states.BelowReflectance[state] < 1 || states.AboveReflectance[state] < 1 || film.Cavity.AboveReflectanceByAngle is not null
                || states.Absorption.Any(layer => layer[state] > 0))
            {
                continue;
            }

            throw new InputException(new InputFault(film.Title, null, null, FormattableString.Invariant(
                $"at {WavelengthGrid.NmAt(spectra.Bins[state])} nm below_reflectance and above_reflectance are both 1 and the film absorbs nothing: light can never leave. Lower one of them.")));
        }
    }

    private static void RequireNumbers(FilmSpectra spectra, double[] answers)
    {
        int perState = answers.Length / Math.Max(1, spectra.Bins.Length);
        for (int state = 0; state < spectra.Bins.Length; state++)
        {
            if (answers.AsSpan(state * perState, perState).ContainsAnyExceptInRange(double.MinValue, double.MaxValue))
                throw new NumericalFailureException(FormattableString.Invariant($"The exact model finds no number for this film at {WavelengthGrid.NmAt(spectra.Bins[state])} nm."));
        }
    }

    private FilmOutput Finish(Film film, FilmOutput output, Effort effort, double estimate)
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
            Accuracy = new(_accuracyShare, estimate, 2 * effort.Ordinates, effort.Cells, WavelengthGrid.Count),
        };
    }

    private static double LongestFlightMm(Film film, IReadOnlyList<MergedLayer> layers, OpticalStates states)
    {
        double longest = film.Sheet?.WidthMm ?? 1e6 * layers.Sum(layer => layer.ThicknessMm);
        for (int state = 0; state < states.Count; state++)
        {
            for (int layer = 0; layer < layers.Count; layer++)
            {
                if ((states.Absorption[layer][state] + states.Scattering[layer][state]) * longest < GuidedLight<WideLanes>.OutOfReach)
                    return longest;
            }
        }

        return double.PositiveInfinity;
    }
}
