using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>White as a function of the loadings of two free lots, on any model. Counts its solves.</summary>
internal sealed class LoadingProblem
{
    // A layer of dots alone has no host that would hold them.
    private const double FullestVolumeShare = 0.999;

    private readonly IFilmModel _model;
    private readonly WhiteMeter _meter;
    private readonly CancellationToken _cancellation;
    private readonly double[] _startMgPerMl;
    private readonly bool _hasRoomForAll;

    // Shared with the problems made from this one: what an explanation costs is counted too.
    private readonly SolveCount _solves = new();

    public LoadingProblem(FilmCase filmCase, IFilmModel model, CancellationToken cancellation)
    {
        FilmCase = filmCase;
        Target = filmCase.Target ?? throw Fault("target: none is given; a formulation needs one.");
        if (Target.Free.Count != 2)
            throw Fault($"target.free names {Target.Free.Count} lots; a white point has two coordinates, so exactly two lots are free.");
        _model = model;
        _cancellation = cancellation;
        _meter = new WhiteMeter(filmCase, Target.Place);
        _startMgPerMl = [.. Target.Free.Select(free => Entries(free.LotName).Select(dots => dots.LoadingMgPerMl).DefaultIfEmpty(-1).Max())];
        for (int i = 0; i < 2; i++)
        {
            if (_startMgPerMl[i] < 0)
                throw Fault($"target.free: lot '{Target.Free[i].LotName}' stands in no layer.");
        }
    }

    private LoadingProblem(LoadingProblem other, FilmCase filmCase, bool hasRoomForAll)
    {
        (FilmCase, Target, _model, _meter, _cancellation) = (filmCase, other.Target, other._model, other._meter, other._cancellation);
        (_startMgPerMl, _hasRoomForAll, _solves) = (other._startMgPerMl, hasRoomForAll, other._solves);
    }

    public FilmCase FilmCase { get; }

    public WhiteTarget Target { get; }

    public Chromaticity Wanted => new(Target.WhiteX, Target.WhiteY);

    public int Solves => _solves.Value;

    /// <summary>White this near is what a search aims at: far below any tolerance that a line can hold, or above the noise of a tracer.</summary>
    public double AimXy => _solves.IsTraced ? Target.ToleranceXy / 2 : 1e-9;

    /// <summary>White this near needs no second search.</summary>
    public double EnoughXy => _solves.IsTraced ? Target.ToleranceXy : Math.Min(1e-7, Target.ToleranceXy);

    /// <summary>Step of derivatives in the logarithm of a loading.</summary>
    public double DerivativeStep => _solves.IsTraced ? 0.3 : 1e-5;

    /// <summary>Peak of the source, nm.</summary>
    public double SourcePeakNm => EmissionBands.Of("source", FilmCase.Film.Backlight.Photons).PeakNm ?? 0;

    /// <summary>Loading of the file (the lot's largest of any layer), mg/mL.</summary>
    public double StartMgPerMl(int free) => _startMgPerMl[free];

    /// <summary>The lot that moves.</summary>
    public DotLot Lot(int free) => FilmCase.Film.Lots.First(lot => lot.Name == Target.Free[free].LotName);

    /// <summary>The same problem in layers that have room for any loading.</summary>
    public LoadingProblem WithoutBounds() => new(this, FilmCase, hasRoomForAll: true);

    /// <summary>The same problem with all source light falling on the film.</summary>
    public LoadingProblem WithoutBypass() => new(
        this, FilmCase with { Film = FilmCase.Film with { Cavity = FilmCase.Film.Cavity with { BypassShare = 0 } } }, _hasRoomForAll);

    /// <summary>The same problem with the free lots alone.</summary>
    /// <param name="fixedLots">The lots that went.</param>
    public LoadingProblem WithoutFixedLots(out IReadOnlyList<string> fixedLots)
    {
        fixedLots = [.. FilmCase.Film.Layers.SelectMany(layer => layer.Dots)
            .Where(dots => dots.LoadingMgPerMl > 0 && !IsFree(dots)).Select(dots => dots.Lot.Name).Distinct(StringComparer.Ordinal)];
        var film = FilmCase.Film.WithLoadings((_, dots) => IsFree(dots) ? dots.LoadingMgPerMl : 0);
        return new(this, FilmCase with { Film = film }, _hasRoomForAll);
    }

    /// <summary>The film at two loadings; each lot's loadings in all layers move by one factor (from nothing: to the same loading).</summary>
    /// <remarks>Where the dots of a layer would have no room, both loadings are lowered by one factor until they have.</remarks>
    public Film FilmAt(double firstMgPerMl, double secondMgPerMl)
    {
        var film = WithLoadings(firstMgPerMl, secondMgPerMl);
        double factor = _hasRoomForAll ? 1 : film.Layers.Min(RoomFactor);
        return factor < 1 ? WithLoadings(factor * firstMgPerMl, factor * secondMgPerMl) : film;
    }

    /// <summary>Whether the host still has room at two loadings; true where a density is not known.</summary>
    public bool HasRoomFor(double firstMgPerMl, double secondMgPerMl) =>
        WithLoadings(firstMgPerMl, secondMgPerMl).Layers.All(layer => RoomFactor(layer) == 1);

    // What the free lots of a layer have to shrink by; 1 where they have room, or where a density is not known.
    private double RoomFactor(Layer layer)
    {
        if (!(Loadings.DotVolumeShare(layer) is > FullestVolumeShare and var share))
            return 1;
        double free = layer.Dots.Where(IsFree)
            .Sum(dots => Loadings.VolumeShareFromMgPerMl(dots.LoadingMgPerMl, dots.Lot.DensityGPerMl ?? double.PositiveInfinity));
        return Math.Max(0, 1 - ((share - FullestVolumeShare) / free));
    }

    private Film WithLoadings(double firstMgPerMl, double secondMgPerMl) => FilmCase.Film.WithLoadings((_, dots) =>
    {
        for (int i = 0; i < 2; i++)
        {
            if (dots.Lot.Name != Target.Free[i].LotName)
                continue;
            double loadingMgPerMl = i == 0 ? firstMgPerMl : secondMgPerMl;
            return _startMgPerMl[i] > 0 ? dots.LoadingMgPerMl * (loadingMgPerMl / _startMgPerMl[i]) : loadingMgPerMl;
        }

        return dots.LoadingMgPerMl;
    });

    public FilmOutput OutputAt(double firstMgPerMl, double secondMgPerMl)
    {
        var output = _model.Solve(FilmAt(firstMgPerMl, secondMgPerMl), _cancellation);
        _solves.Add(output);
        return output;
    }

    /// <summary>White at two loadings, or null where no light arrives.</summary>
    public Tristimulus? WhiteAt(double firstMgPerMl, double secondMgPerMl)
    {
        var white = _meter.Read(OutputAt(firstMgPerMl, secondMgPerMl));
        return white.HasColour && white.Y > 0 ? white : null;
    }

    public double DistanceAt(double firstMgPerMl, double secondMgPerMl) =>
        WhiteAt(firstMgPerMl, secondMgPerMl) is { } white ? white.Chromaticity.DistanceXyTo(Wanted) : 2;

    /// <summary>White of a result, where the target is judged.</summary>
    public Chromaticity ChromaticityOf(FilmOutput output) => _meter.Read(output).Chromaticity;

    /// <summary>Colour of one light, where the target is judged; null without light.</summary>
    public Chromaticity? ChromaticityOf(Spectrum<PhotonPerNm> light) => _meter.Read(light) is { HasColour: true } read ? read.Chromaticity : null;

    /// <summary>The loading at which a lot alone has an optical depth of 1 for the source along the normal; null where it absorbs nothing.</summary>
    public double? UnitDepthMgPerMl(int free)
    {
        double depthPerMgPerMl = 0;
        var source = FilmCase.Film.Backlight.Photons.Samples;
        foreach (var layer in FilmCase.Film.Layers)
        {
            foreach (var dots in layer.Dots.Where(dots => dots.Lot.Name == Target.Free[free].LotName))
            {
                double factor = _startMgPerMl[free] > 0 ? dots.LoadingMgPerMl / _startMgPerMl[free] : 1;
                var unit = dots with { LoadingMgPerMl = factor };
                for (int w = 0; w < source.Length; w++)
                    depthPerMgPerMl += source[w] * unit.AbsorptionPerMm(w) * layer.ThicknessMm;
            }
        }

        return depthPerMgPerMl > 1e-12 ? 1 / depthPerMgPerMl : null;
    }

    private bool IsFree(DotLoading dots) => Target.Free.Any(free => free.LotName == dots.Lot.Name);

    private IEnumerable<DotLoading> Entries(string lotName) =>
        FilmCase.Film.Layers.SelectMany(layer => layer.Dots).Where(dots => dots.Lot.Name == lotName);

    private InputException Fault(string message) => new(new InputFault(FilmCase.Film.Title, null, null, message));

    private sealed class SolveCount
    {
        public int Value { get; private set; }

        public bool IsTraced { get; private set; }

        public void Add(FilmOutput output)
        {
            Value++;
            IsTraced |= output.Tracing is not null;
        }
    }
}
