using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>Traces one photon after another, in double precision and three dimensions: the readable reference.</summary>
/// <remarks>
/// Analog: a photon has weight 1, is followed to the one fate it ends in, and each choice is drawn with its own
/// probability. So counts sum to the photons started, exactly.
/// </remarks>
internal ref struct ScalarTracer
{
    private readonly TracedFilm _film;
    private readonly Tally _tally;
    private readonly ILateralTally? _lateral;
    private readonly Span<int> _excitations;
    private Xoshiro256 _random;

    // Where and whither: the layer (−1 is the air below, LayerCount the air above), depth in it, position, direction.
    private int _layer;
    private double _depth, _x, _y, _ux, _uy, _uz;
    private int _bin, _emitter;
    private double _flown;

    private ScalarTracer(TracedFilm film, Tally tally, ILateralTally? lateral, Xoshiro256 random, Span<int> excitations)
    {
        (_film, _tally, _lateral, _random) = (film, tally, lateral, random);
        _excitations = excitations;
    }

    /// <summary>Traces a block of photons.</summary>
    /// <param name="film">Tables of the film.</param>
    /// <param name="random">The block's own stream.</param>
    /// <param name="photons">How many source photons.</param>
    /// <param name="tally">Counts what they end as.</param>
    /// <param name="lateral">Where they start and come out, or null.</param>
    public static void Trace(TracedFilm film, Xoshiro256 random, int photons, Tally tally, ILateralTally? lateral = null)
    {
        Span<int> excitations = stackalloc int[film.LotCount];
        var tracer = new ScalarTracer(film, tally, lateral, random, excitations);
        for (int i = 0; i < photons; i++)
            tracer.TracePhoton();
        tally.EndBlock(photons);
    }

    private void TracePhoton()
    {
        _excitations.Clear();
        (_bin, _emitter, _flown) = (_film.Source.Draw(_random.NextShare()), 0, 0);
        (_x, _y) = _lateral?.Start(ref _random) ?? (0, 0);
        double cosine = _film.SourceAngles.DrawCosine(ref _random);
        bool alive = true;
        if (_film.BypassShare > 0 && _random.NextShare() < _film.BypassShare)
        {
            alive = MeetSheetsAbove(cosine);
        }
        else
        {
            _layer = -1;
            PointAlong(cosine);
        }

        while (alive)
            alive = _layer < 0 || _layer >= _film.LayerCount ? MeetFace(_film.IndexWithAir) : Fly();
    }

    /// <summary>One flight inside a layer, to an interaction or to a face.</summary>
    private bool Fly()
    {
        int cell = (_layer * WavelengthGrid.Count) + _bin;
        double extinction = _film.Extinction[cell];
        double flight = extinction > 0 ? -Math.Log(_random.NextShare()) / extinction : double.PositiveInfinity;
        double cosine = Math.Abs(_uz);
        double thickness = _film.ThicknessMm[_layer];
        double ahead = _uz > 0 ? thickness - _depth : _depth;
        double rise = cosine * flight;
        if (rise > ahead)
        {
            if (!IsGuided())
                return FlyToFace(ahead, cosine);
            if (_flown + flight > _film.LongestFlightMm)
            {
                _tally.LostAtEdges++;
                _tally.Interactions++;
                return false;
            }

            double depth = GuidedFlight.Fold(thickness - ahead, rise, thickness, _random.NextShare(), out bool turned);
            _uz = turned ? -_uz : _uz;
            _depth = _uz > 0 ? depth : thickness - depth;
        }
        else
        {
            _depth = Math.Clamp(_depth + (_uz * flight), 0, thickness);
        }

        _flown = 0;
        return MoveSideways(flight) && Interact(cell);
    }

    private bool FlyToFace(double ahead, double cosine)
    {
        double length = ahead / cosine;
        _flown += length;
        if (_flown > _film.LongestFlightMm)
        {
            _tally.LostAtEdges++;
            _tally.Interactions++;
            return false;
        }

        _depth = _uz > 0 ? _film.ThicknessMm[_layer] : 0;
        return MoveSideways(length) && MeetFace(_film.IndexWithAir);
    }

    private bool MoveSideways(double length)
    {
        _x += _ux * length;
        _y += _uy * length;
        if (_lateral is null || !_lateral.IsBeyondEdge(_x, _y))
            return true;
        _tally.LostAtEdges++;
        _tally.Interactions++;
        return false;
    }

    /// <summary>Whether both faces of the layer reflect all of this photon.</summary>
    private readonly bool IsGuided()
    {
        double[] index = _film.IndexWithAir;
        double own = index[_layer + 1];
        double across = Math.Max(index[_layer], index[_layer + 2]) / own;
        return across < 1 && 1 - (_uz * _uz) >= across * across;
    }

    private bool MeetFace(double[] index)
    {
        _tally.Interactions++;
        int next = _uz > 0 ? _layer + 1 : _layer - 1;
        double ratio = index[_layer + 1] / index[next + 1];
        double reflectance = FresnelFace.Reflectance(ratio, Math.Abs(_uz), out double behindCosine);
        if (_random.NextShare() < reflectance)
        {
            _uz = -_uz;
        }
        else
        {
            (_ux, _uy) = (_ux * ratio, _uy * ratio);
            _uz = Math.CopySign(behindCosine, _uz);
            _layer = next;
            if (next >= 0 && next < _film.LayerCount)
                _depth = _uz > 0 ? 0 : _film.ThicknessMm[next];
        }

        if (_layer < 0 && _uz < 0)
            return MeetReflectorBelow();
        return _layer < _film.LayerCount || _uz < 0 || MeetSheetsAbove(_uz);
    }

    private bool MeetReflectorBelow()
    {
        if (_random.NextShare() >= _film.BelowReflectance[_bin])
        {
            _tally.LostBelow++;
            return false;
        }

        _flown = 0;
        PointAlong(IncidenceSampler.LambertianCosine(_random.NextShare()));
        return true;
    }

    private bool MeetSheetsAbove(double airCosine)
    {
        double share = _random.NextShare();
        double returned = _film.ReturnAbove(_bin, airCosine);
        if (share < returned)
        {
            (_layer, _flown) = (_film.LayerCount, 0);
            PointAlong(-IncidenceSampler.LambertianCosine(_random.NextShare()));
            return true;
        }

        if (share < returned + _film.AboveAbsorptance[_bin])
        {
            _tally.LostAbove++;
        }
        else
        {
            _tally.CountAbove(_emitter, _bin, airCosine);
            _lateral?.CountAbove(_emitter, _bin, _x, _y);
        }

        return false;
    }

    private bool Interact(int cell)
    {
        _tally.Interactions++;
        if (_random.NextShare() >= _film.AbsorbedShare[cell])
        {
            Scatter(_film.Anisotropy[cell]);
            return true;
        }

        int lot = _film.DrawAbsorber(cell, _random.NextShare());
        if (lot < 0)
        {
            _tally.LostInHost++;
            return false;
        }

        _tally.CountExcitation(lot, _emitter, _excitations[lot]++);
        if (_random.NextShare() >= _film.YieldShare[lot])
        {
            _tally.LostInLots[lot]++;
            return false;
        }

        (_bin, _emitter) = (_film.Emission[lot].Draw(_random.NextShare()), lot + 1);
        PointAlong((2 * _random.NextShare()) - 1);
        return true;
    }

    private void PointAlong(double cosine)
    {
        _uz = cosine;
        if (_lateral is null)
            return;
        double sine = Math.Sqrt((1 - cosine) * (1 + cosine));
        (double sin, double cos) = Math.SinCos(2 * Math.PI * _random.NextShare());
        (_ux, _uy) = (sine * cos, sine * sin);
    }

    private void Scatter(double meanCosine)
    {
        double versine = HenyeyGreenstein.DrawVersine(meanCosine, _random.NextShare());
        double turn = Math.Sqrt(versine * (2 - versine));
        (double sin, double cos) = Math.SinCos(2 * Math.PI * _random.NextShare());
        double sine = Math.Sqrt((1 - _uz) * (1 + _uz));
        double uz = (_uz * (1 - versine)) + (sine * turn * cos);
        if (_lateral is not null)
            TurnSideways(versine, turn, sin, cos, sine);

        // A direction exactly along the faces would never meet one.
        _uz = Math.Abs(uz) < 1e-12 ? 1e-12 : Math.Clamp(uz, -1, 1);
    }

    private void TurnSideways(double versine, double turn, double sin, double cos, double sine)
    {
        // Unit vectors across the old direction: one in the vertical plane through it, one level. Along the normal any pair does.
        (double levelX, double levelY) = sine > 1e-9 ? (-_uy / sine, _ux / sine) : (0, 1);
        (double tiltX, double tiltY) = sine > 1e-9 ? (-_uz * _ux / sine, -_uz * _uy / sine) : (1, 0);
        double ux = (_ux * (1 - versine)) + (turn * ((cos * tiltX) + (sin * levelX)));
        double uy = (_uy * (1 - versine)) + (turn * ((cos * tiltY) + (sin * levelY)));
        (_ux, _uy) = (ux, uy);
    }
}
