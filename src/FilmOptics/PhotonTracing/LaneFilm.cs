using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>The tables of a film in single precision, as vector lanes take them.</summary>
internal sealed class LaneFilm
{
    /// <summary>Layers that fit beside both airs in the lanes of one vector.</summary>
    public const int MostLayers = 14;

    // Stands for "no extinction": longer than any flight that is followed, yet finite.
    private const float EndlessMm = 1e30f;

    public LaneFilm(TracedFilm film)
    {
        Film = film;
        for (int i = 0; i < film.LayerCount + 2; i++)
        {
            bool isAir = i == 0 || i == film.LayerCount + 1;
            ThicknessMm[i] = isAir ? 0 : (float)film.ThicknessMm[i - 1];
            RatioUp[i] = i <= film.LayerCount ? (float)(film.IndexWithAir[i] / film.IndexWithAir[i + 1]) : 1;
            RatioDown[i] = i > 0 ? (float)(film.IndexWithAir[i] / film.IndexWithAir[i - 1]) : 1;
        }

        FreePathMm = [.. film.Extinction.Select(k => k > 1 / EndlessMm ? (float)(1 / k) : EndlessMm)];
        AbsorbedShare = [.. film.AbsorbedShare.Select(share => (float)share)];
        Anisotropy = [.. film.Anisotropy.Select(g => (float)g)];
        LongestFlightMm = (float)Math.Min(film.LongestFlightMm, EndlessMm / 1e8);
    }

    public TracedFilm Film { get; }

    /// <summary>At 0 the air below, then the layers, then the air above.</summary>
    public float[] ThicknessMm { get; } = new float[16];

    /// <summary>Index of a place ÷ index above it.</summary>
    public float[] RatioUp { get; } = new float[16];

    /// <summary>Index of a place ÷ index below it.</summary>
    public float[] RatioDown { get; } = new float[16];

    /// <summary>Mean free path, mm, at [layer × bins + bin].</summary>
    public float[] FreePathMm { get; }

    public float[] AbsorbedShare { get; }

    public float[] Anisotropy { get; }

    public float LongestFlightMm { get; }

    /// <summary>Cell of a place inside the film.</summary>
    public static int Cell(int place, int bin) => ((place - 1) * WavelengthGrid.Count) + bin;
}
