using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>White as a function of the loadings of two free lots, on any model. Counts its solves.</summary>
internal sealed class LoadingProblem
{
    private readonly IFilmModel _model;
    private readonly WhiteMeter _meter;
    private readonly CancellationToken _cancellation;
    private readonly double[] _startMgPerMl;

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

    public FilmCase FilmCase { get; }

    public WhiteTarget Target { get; }

    public Chromaticity Wanted => new(Target.WhiteX, Target.WhiteY);

    public int Solves { get; private set; }

    /// <summary>Loading of the file (the lot's largest of any layer), mg/mL.</summary>
    public double StartMgPerMl(int free) => _startMgPerMl[free];

    /// <summary>The lot that moves.</summary>
    public DotLot Lot(int free) => FilmCase.Film.Lots.First(lot => lot.Name == Target.Free[free].LotName);

    /// <summary>The film at two loadings; each lot's loadings in all layers move by one factor (from nothing: to the same loading).</summary>
    public Film FilmAt(double firstMgPerMl, double secondMgPerMl) => FilmCase.Film.WithLoadings((_, dots) =>
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
        Solves++;
        return _model.Solve(FilmAt(firstMgPerMl, secondMgPerMl), _cancellation);
    }

    /// <summary>White at two loadings, or null where no light arrives.</summary>
    public Tristimulus? WhiteAt(double firstMgPerMl, double secondMgPerMl)
    {
        var white = _meter.Read(OutputAt(firstMgPerMl, secondMgPerMl));
        return white.HasColour && white.Y > 0 ? white : null;
    }

    public double DistanceAt(double firstMgPerMl, double secondMgPerMl) =>
        WhiteAt(firstMgPerMl, secondMgPerMl) is { } white ? white.Chromaticity.DistanceXyTo(Wanted) : 2;

    /// <summary>Chromaticities, where the target is judged, of the light of each last emitter: the source, then the two free lots.</summary>
    public IReadOnlyList<Chromaticity?> Corners(FilmOutput output)
    {
        return [Of(output.Unconverted), .. Target.Free.Select((_, i) => Of(output.ConvertedByLot[FilmCase.Film.IndexOf(Lot(i))]))];

        Chromaticity? Of(Spectrum<PhotonPerNm> light) => _meter.Read(light) is { HasColour: true } read ? read.Chromaticity : null;
    }

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

    private IEnumerable<DotLoading> Entries(string lotName) =>
        FilmCase.Film.Layers.SelectMany(layer => layer.Dots).Where(dots => dots.Lot.Name == lotName);

    private InputException Fault(string message) => new(new InputFault(FilmCase.Film.Title, null, null, message));
}
