namespace FilmOptics.PhotonTracing;

/// <summary>Where photons start on the sheet and where they come out.</summary>
internal interface ILateralTally
{
    /// <summary>Position at which the next source photon reaches the film, mm.</summary>
    (double X, double Y) Start(ref Xoshiro256 random);

    /// <summary>Whether a position lies outside the cut sheet.</summary>
    bool IsBeyondEdge(double x, double y);

    /// <summary>A photon left above.</summary>
    void CountAbove(int emitter, int bin, double x, double y);
}
