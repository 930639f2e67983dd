using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.PhotonTracing;

/// <summary>Photons in flight, one per lane.</summary>
internal struct LaneState
{
    /// <summary>0 is the air below, then the layers from 1, then the air above.</summary>
    public Vector512<int> Place;

    /// <summary>Depth in the layer from its lower face, mm.</summary>
    public Vector512<float> Depth;

    /// <summary>Direction cosine against the upward normal; never 0.</summary>
    public Vector512<float> Cosine;

    public Vector512<float> FreePath;

    public Vector512<float> AbsorbedShare;

    public Vector512<float> Anisotropy;

    public Vector512<int> Bin;

    public Vector512<int> Emitter;
}

/// <summary>What happens to a lane seldom: starting, leaving the film, returns, absorption and re-emission.</summary>
internal ref struct LaneEvents
{
    public const int Lanes = 16;

    private readonly LaneFilm _lane;
    private readonly TracedFilm _film;
    private readonly Tally _tally;
    private readonly Span<int> _excitations;
    private Xoshiro256 _random;
    private int _toLaunch;

    public LaneEvents(LaneFilm film, Xoshiro256 random, int photons, Tally tally, Span<int> excitations)
    {
        (_lane, _film, _random, _toLaunch, _tally) = (film, film.Film, random, photons, tally);
        _excitations = excitations;
        Active = Lanes;
    }

    public LaneState State;

    /// <summary>Lanes that hold a photon.</summary>
    public int Active { get; private set; }

    /// <summary>Does what is due in each lane whose bit is set.</summary>
    public void Handle(ulong due, ulong absorbed, ulong edges, ulong leaves)
    {
        for (; due != 0; due &= due - 1)
        {
            int lane = BitOperations.TrailingZeroCount(due);
            bool alive = true;
            if (IsSet(edges, lane))
            {
                _tally.LostAtEdges++;
                alive = false;
            }
            else if (IsSet(leaves, lane))
            {
                double cosine = At(ref State.Cosine, lane);
                alive = cosine > 0 ? MeetSheetsAbove(lane, cosine) : MeetReflectorBelow(lane);
            }
            else if (IsSet(absorbed, lane))
            {
                alive = Absorb(lane);
            }
            else
            {
                LoadCell(lane, At(ref State.Place, lane), At(ref State.Bin, lane));
            }

            if (!alive)
                Launch(lane);
        }
    }

    /// <summary>Puts the next source photon into a lane, or nothing when there is none left.</summary>
    public void Launch(int lane)
    {
        while (_toLaunch > 0)
        {
            _toLaunch--;
            int bin = _film.Source.Draw(_random.NextShare());
            (At(ref State.Bin, lane), At(ref State.Emitter, lane)) = (bin, 0);
            _excitations.Slice(lane * _film.LotCount, _film.LotCount).Clear();
            double cosine = _film.SourceAngles.DrawCosine(ref _random);
            (At(ref State.Depth, lane), At(ref State.Place, lane)) = (0, 0);
            LoadCell(lane, 1, bin);
            if (_film.BypassShare == 0 || _random.NextShare() >= _film.BypassShare)
            {
                At(ref State.Cosine, lane) = (float)cosine;
                return;
            }

            if (MeetSheetsAbove(lane, cosine))
                return;
        }

        Idle(lane);
    }

    private static bool IsSet(ulong mask, int lane) => ((mask >> lane) & 1) != 0;

    private static ref float At(ref Vector512<float> vector, int lane) =>
        ref Unsafe.Add(ref Unsafe.As<Vector512<float>, float>(ref vector), lane);

    private static ref int At(ref Vector512<int> vector, int lane) =>
        ref Unsafe.Add(ref Unsafe.As<Vector512<int>, int>(ref vector), lane);

    private void LoadCell(int lane, int place, int bin)
    {
        int cell = LaneFilm.Cell(place, bin);
        At(ref State.FreePath, lane) = _lane.FreePathMm[cell];
        At(ref State.AbsorbedShare, lane) = _lane.AbsorbedShare[cell];
        At(ref State.Anisotropy, lane) = _lane.Anisotropy[cell];
    }

    private bool MeetReflectorBelow(int lane)
    {
        if (_random.NextShare() >= _film.BelowReflectance[At(ref State.Bin, lane)])
        {
            _tally.LostBelow++;
            return false;
        }

        At(ref State.Cosine, lane) = (float)IncidenceSampler.LambertianCosine(_random.NextShare());
        return true;
    }

    private bool MeetSheetsAbove(int lane, double airCosine)
    {
        int bin = At(ref State.Bin, lane);
        double share = _random.NextShare();
        double returned = _film.ReturnAbove(bin, airCosine);
        if (share < returned)
        {
            At(ref State.Place, lane) = _film.LayerCount + 1;
            At(ref State.Cosine, lane) = -(float)IncidenceSampler.LambertianCosine(_random.NextShare());
            return true;
        }

        if (share < returned + _film.AboveAbsorptance[bin])
            _tally.LostAbove++;
        else
            _tally.CountAbove(At(ref State.Emitter, lane), bin, airCosine);
        return false;
    }

    private bool Absorb(int lane)
    {
        int place = At(ref State.Place, lane);
        int lot = _film.DrawAbsorber(LaneFilm.Cell(place, At(ref State.Bin, lane)), _random.NextShare());
        if (lot < 0)
        {
            _tally.LostInHost++;
            return false;
        }

        _tally.CountExcitation(
            lot, At(ref State.Emitter, lane), _excitations[(lane * _film.LotCount) + lot]++);
        if (_random.NextShare() >= _film.YieldShare[lot])
        {
            _tally.LostInLots[lot]++;
            return false;
        }

        int bin = _film.Emission[lot].Draw(_random.NextShare());
        (At(ref State.Bin, lane), At(ref State.Emitter, lane)) = (bin, lot + 1);
        At(ref State.Cosine, lane) = (float)((2 * _random.NextShare()) - 1);
        LoadCell(lane, place, bin);
        return true;
    }

    /// <summary>Parks an empty lane: it scatters on the spot and touches nothing.</summary>
    private void Idle(int lane)
    {
        Active--;
        float thickness = _lane.ThicknessMm[1];
        (At(ref State.Place, lane), At(ref State.Depth, lane), At(ref State.Cosine, lane)) = (1, thickness / 2, 1);
        At(ref State.FreePath, lane) = thickness * 1e-6f;
        (At(ref State.AbsorbedShare, lane), At(ref State.Anisotropy, lane)) = (0, 0);
    }
}
