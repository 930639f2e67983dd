using System.Buffers;
using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Scratch of one thread for films with the same light: nothing is allocated for another film of them but its result.</summary>
internal sealed class FilmSolver(FilmLights lights, int layers)
{
    private readonly FilmSpectra _spectra = new(lights, layers);
    private readonly Dictionary<Effort, (FilmPlan Plan, Reemission Reemission)> _reemissions = [];
    private StateWeights? _weights;
    private LightMoments? _moments;
    private AbsorptionAxis? _axis;

    public FilmLights Lights { get; } = lights;

    /// <summary>Optical states of the last solve: wavelengths, or nodes of a table over absorption.</summary>
    public int States { get; private set; }

    /// <summary>Takes in a film.</summary>
    /// <param name="film">The film.</param>
    /// <param name="filmLayers">Its layers.</param>
    /// <param name="shape">Its shape.</param>
    /// <param name="effort">The effort that is wanted first.</param>
    /// <param name="cancellationToken">Stops long work.</param>
    public void Load(Film film, IReadOnlyList<MergedLayer> filmLayers, StoredShape shape, Effort effort, CancellationToken cancellationToken)
    {
        _spectra.Load(filmLayers);
        RequireAnEnd(film);
        _axis = effort.StepNm > 1 && shape.Shape.VaryingLayer is { } varying
            ? shape.Axis(film, filmLayers, Largest(_spectra.Absorption[varying]), effort, cancellationToken)
            : null;
        if (_axis is null)
            return;
        if (_weights?.Width != _axis.Nodes)
            (_weights, _moments) = (new StateWeights(Lights.Bins.Length, _axis.Nodes), new LightMoments(_spectra, _axis.Nodes));
        _axis.Fill(_weights, _spectra.Absorption[_axis.Layer]);
        _moments!.Fill(_weights);
    }

    /// <summary>The loaded film at an effort.</summary>
    public FilmOutput Solve(Film film, IReadOnlyList<MergedLayer> filmLayers, StoredShape shape, Effort effort, string model, CancellationToken cancellationToken)
    {
        if (effort.StepNm > 1 && _axis is not null)
        {
            States = _axis.Nodes;
            var quick = Build(film, shape.Table(film, filmLayers, effort, _axis, cancellationToken), _weights!, _moments!, effort, model);
            if (shape.Suffices(_axis, quick.Budget.Unconverted + quick.Budget.Converted))
                return quick;
            _axis = null;
        }

        var axis = new WavelengthAxis(Lights, shape.Shape.MayGuide ? 1 : effort.StepNm);
        var plan = shape.Plan(film, filmLayers, effort);
        var states = OpticalStates.At(film, filmLayers, axis.Bins);
        States = axis.Bins.Length;
        int length = States * plan.Rows * plan.Inputs;
        double[] answers = ArrayPool<double>.Shared.Rent(length);
        var kernels = new FilmKernels(plan, States, answers);
        StateSolver<WideLanes>.Solve(
            plan, states, film.Cavity.BypassShare, states.LongestFlightMm(film, filmLayers), answers.AsSpan(0, length), cancellationToken);
        RequireNumbers(kernels, axis);
        var moments = new LightMoments(_spectra, States);
        moments.Fill(axis.Weights);
        var output = Build(film, kernels, axis.Weights, moments, effort, model);
        ArrayPool<double>.Shared.Return(answers);
        return output;
    }

    private FilmOutput Build(Film film, FilmKernels kernels, StateWeights weights, LightMoments moments, Effort effort, string model)
    {
        if (!_reemissions.TryGetValue(effort, out var known) || !ReferenceEquals(known.Plan, kernels.Plan))
            _reemissions[effort] = known = (kernels.Plan, new Reemission(kernels.Plan, _spectra));
        known.Reemission.Solve(kernels, moments);
        return new OutputBuilder(film, kernels, Lights, weights, known.Reemission).Build(model);
    }

    // Light that nothing ends has no answer: the geometric series of the returns diverges.
    private void RequireAnEnd(Film film)
    {
        var below = film.Cavity.BelowReflectance.Samples;
        var above = film.Cavity.AboveReflectance.Samples;
        if (film.Cavity.AboveReflectanceByAngle is not null)
            return;
        for (int i = 0; i < Lights.Bins.Length; i++)
        {
            int bin = Lights.Bins[i];
            if (below[bin] < 1 || above[bin] < 1 || Array.Exists(_spectra.Absorption, layer => layer[i] > 0))
                continue;
            throw new InputException(new InputFault(film.Title, null, null, FormattableString.Invariant(
                $"at {WavelengthGrid.NmAt(bin)} nm below_reflectance and above_reflectance are both 1 and the film absorbs nothing: light can never leave. Lower one of them.")));
        }
    }

    private static void RequireNumbers(FilmKernels kernels, WavelengthAxis axis)
    {
        for (int i = 0; i < axis.Bins.Length; i++)
        {
            if (kernels.Of(i).ContainsAnyExceptInRange(double.MinValue, double.MaxValue))
                throw new NumericalFailureException(FormattableString.Invariant($"The exact model finds no number for this film at {WavelengthGrid.NmAt(axis.Bins[i])} nm."));
        }
    }

    private static double Largest(double[] values)
    {
        double largest = 0;
        foreach (double value in values)
            largest = Math.Max(largest, value);
        return largest;
    }
}
