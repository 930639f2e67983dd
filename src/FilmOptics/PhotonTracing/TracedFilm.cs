using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>A film laid out for tracing: flat tables by layer and wavelength, and how to draw from them.</summary>
/// <remarks>Takes nothing from the other models but the film's description. Immutable, shared by all threads.</remarks>
internal sealed class TracedFilm
{
    private readonly double[] _absorberShares;
    private readonly AngleTable? _aboveReflectanceByAngle;

    public TracedFilm(Film film)
    {
        int bins = WavelengthGrid.Count;
        (LayerCount, LotCount) = (film.Layers.Count, film.Lots.Count);
        ThicknessMm = [.. film.Layers.Select(layer => layer.ThicknessMm)];

        // Air below and above stand at both ends, so that the neighbour of layer i is i + 1 ± 1 without a special case.
        IndexWithAir = [1, .. film.Layers.Select(layer => layer.RefractiveIndex), 1];
        Extinction = new double[LayerCount * bins];
        AbsorbedShare = new double[LayerCount * bins];
        Anisotropy = new double[LayerCount * bins];
        _absorberShares = new double[LayerCount * bins * (LotCount + 1)];
        for (int layer = 0; layer < LayerCount; layer++)
        {
            for (int bin = 0; bin < bins; bin++)
                FillCell(film, layer, bin);
        }

        (BelowReflectance, AboveReflectance, AboveAbsorptance) = (
            film.Cavity.BelowReflectance.Samples.ToArray(),
            film.Cavity.AboveReflectance.Samples.ToArray(),
            film.Cavity.AboveAbsorptance.Samples.ToArray());
        _aboveReflectanceByAngle = film.Cavity.AboveReflectanceByAngle;
        BypassShare = film.Cavity.BypassShare;
        Source = new AliasTable(film.Backlight.Photons.Samples);
        SourceAngles = new IncidenceSampler(film.Backlight.Incidence);
        Emission = [.. film.Lots.Select(lot => new AliasTable(lot.Emission.Samples))];
        YieldShare = [.. film.Lots.Select(lot => lot.FilmYieldShare)];
        LongestFlightMm = film.Sheet?.WidthMm ?? EndlessFlightPerThickness * ThicknessMm.Sum();
    }

    /// <summary>
    /// Without a sheet's width, a guided photon that flew this many thicknesses between two interactions while roaming
    /// between layers counts as guided for ever. Within one layer no such limit is needed: see <see cref="GuidedFlight"/>.
    /// </summary>
    public const double EndlessFlightPerThickness = 1e6;

    public int LayerCount { get; }

    public int LotCount { get; }

    public double[] ThicknessMm { get; }

    public double[] IndexWithAir { get; }

    /// <summary>Absorption and scattering, 1/mm, at [layer × bins + bin].</summary>
    public double[] Extinction { get; }

    /// <summary>Absorption ÷ extinction, at [layer × bins + bin].</summary>
    public double[] AbsorbedShare { get; }

    public double[] Anisotropy { get; }

    public double[] BelowReflectance { get; }

    public double[] AboveReflectance { get; }

    public double[] AboveAbsorptance { get; }

    public double BypassShare { get; }

    public AliasTable Source { get; }

    public IncidenceSampler SourceAngles { get; }

    public AliasTable[] Emission { get; }

    public double[] YieldShare { get; }

    /// <summary>A guided photon that would fly on for longer than this between two interactions comes out at the edges.</summary>
    public double LongestFlightMm { get; }

    /// <summary>Who took an absorbed photon: a lot's position, or −1 for the host.</summary>
    public int DrawAbsorber(int cell, double share)
    {
        int first = cell * (LotCount + 1);
        for (int lot = LotCount; lot > 0; lot--)
        {
            // Shares are cumulative from the host up; the last that lies below the number is the one hit.
            if (share >= _absorberShares[first + lot - 1] && _absorberShares[first + lot] > _absorberShares[first + lot - 1])
                return lot - 1;
        }

        return -1;
    }

    /// <summary>Share of light that the sheets above send back.</summary>
    public double ReturnAbove(int bin, double airCosine) =>
        _aboveReflectanceByAngle is { } byAngle ? byAngle.At(airCosine) : AboveReflectance[bin];

    private void FillCell(Film film, int layerIndex, int bin)
    {
        var layer = film.Layers[layerIndex];
        int cell = (layerIndex * WavelengthGrid.Count) + bin;
        var cumulative = _absorberShares.AsSpan(cell * (LotCount + 1), LotCount + 1);
        cumulative[0] = layer.HostAbsorption.Samples[bin];
        foreach (var dots in layer.Dots)
            cumulative[film.IndexOf(dots.Lot) + 1] += dots.AbsorptionPerMm(bin);
        double absorption = 0;
        foreach (double share in cumulative)
            absorption += share;
        double extinction = absorption + layer.Scattering.Samples[bin];
        if (!(extinction >= 0) || !double.IsFinite(extinction))
        {
            throw new NumericalFailureException(
                $"Layer '{layer.Name}': extinction {extinction} per mm at {WavelengthGrid.NmAt(bin)} nm; it has to be at least 0.");
        }

        (Extinction[cell], Anisotropy[cell]) = (extinction, layer.Anisotropy.Samples[bin]);
        AbsorbedShare[cell] = extinction > 0 ? absorption / extinction : 0;
        double running = 0;
        for (int i = 0; i < cumulative.Length; i++)
            cumulative[i] = absorption > 0 ? (running += cumulative[i]) / absorption : 1;
    }
}
