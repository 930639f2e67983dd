namespace FilmOptics.DiscreteOrdinates;

/// <summary>What of a film does not depend on the wavelength or on loadings: directions, cells, faces and angular weights.</summary>
internal sealed class FilmPlan
{
    private readonly double[] _airCosine;

    /// <summary>Lays out a film at an effort.</summary>
    /// <param name="film">The film.</param>
    /// <param name="layers">Its layers, equal neighbours merged.</param>
    /// <param name="effort">Ordinates and cells.</param>
    /// <param name="withAngles">Whether radiance against angle is wanted.</param>
    public FilmPlan(Film film, IReadOnlyList<MergedLayer> layers, Effort effort, bool withAngles)
    {
        Layers = layers;
        var incidence = film.Backlight.Incidence;
        SourceBeam = incidence.Kind == IncidenceKind.Normal ? 0 : -1;
        ViewBeam = withAngles ? SourceBeam + 1 : -1;
        int beams = SourceBeam + 1 + (withAngles ? 1 : 0);

        // Beyond the indices of layers that emit or scatter no light can travel: a clear barrier's own guided modes stay dark.
        double brightest = layers.Where(layer => layer.Scatters || layer.Emitters.Count > 0)
            .Select(layer => layer.Index).DefaultIfEmpty(1).Max();
        Ordinates = new OrdinateSet(layers.Select(layer => layer.Index).Where(index => index <= brightest), effort.Ordinates, beams);
        var air = Ordinates.In(1);
        _airCosine = air.Cosine;
        Nodes = [.. layers.Select(layer => Ordinates.In(layer.Index))];
        Phases = [.. Nodes.Select(nodes => new PhaseMatrices(nodes, Moments(Math.Min(nodes.Count - beams, 2 * effort.Ordinates))))];
        LayerOrdinates[] media = [air, .. Nodes, air];
        Faces = [.. Enumerable.Range(0, media.Length - 1).Select(face => OrdinateSet.Reflectance(media[face], media[face + 1]))];

        Cells = [.. layers.Select(layer => layer.Emitters.Count > 0 ? effort.Cells : 0)];
        FirstCell = new int[layers.Count];
        for (int layer = 0; layer < layers.Count; layer++)
        {
            FirstCell[layer] = CellCount;
            CellCount += Cells[layer];
        }

        double fluxSum = Ordinates.FluxRoot.Take(AirCount).Sum(root => root * root);
        Collect = Ordinates.FluxRoot[..AirCount];
        Lambertian = [.. Collect.Select(root => root / fluxSum)];
        Source = SourceAmplitudes(incidence, air, beams, withAngles);
        (ReturnCollect, BypassReturn) = ReturnWeights(film, air, beams, incidence);
    }

    /// <summary>Weights that give the radiance above at a polar angle in air from amplitudes there.</summary>
    public double[] RadianceWeights(double angleDeg)
    {
        var weights = new double[AirCount];
        int first = Math.Max(ViewBeam, 0);
        double[] values = AngularMoments.Interpolation(_airCosine.AsSpan(first), Math.Cos(angleDeg * Math.PI / 180));
        for (int j = 0; j < values.Length; j++)
            weights[first + j] = values[j] / (2 * Math.PI * Ordinates.FluxRoot[first + j]);
        return weights;
    }

    public IReadOnlyList<MergedLayer> Layers { get; }

    public OrdinateSet Ordinates { get; }

    /// <summary>Nodes of each layer.</summary>
    public LayerOrdinates[] Nodes { get; }

    public PhaseMatrices[] Phases { get; }

    /// <summary>Reflectance by node of each face, the first below the first layer.</summary>
    public double[][] Faces { get; }

    /// <summary>Cells of each layer with dots, and where they start among all.</summary>
    public int[] Cells { get; }

    /// <inheritdoc cref="Cells"/>
    public int[] FirstCell { get; }

    public int CellCount { get; }

    public int AirCount => Ordinates.AirCount;

    /// <summary>Position of the collimated source's node, or −1.</summary>
    public int SourceBeam { get; }

    /// <summary>Position of the node that looks along the normal, or −1.</summary>
    public int ViewBeam { get; }

    /// <summary>Sums amplitudes in air to a flux.</summary>
    public double[] Collect { get; }

    /// <summary>Amplitudes of a Lambertian flux of 1 in air.</summary>
    public double[] Lambertian { get; }

    /// <summary>Amplitudes of one source photon.</summary>
    public double[] Source { get; }

    /// <summary>Sums amplitudes in air above to the flux sent back, where that depends on angle; null where it does not.</summary>
    public double[]? ReturnCollect { get; }

    /// <summary>Share that the sheets above send back of source light that missed the film, where it depends on angle.</summary>
    public double BypassReturn { get; }

    /// <summary>Where a photon may end outside the cells: above, lost below, in the sheets above, at the edges, in layers without dots.</summary>
    public const int Ends = 5;

    /// <summary>Numbers per state and input: what each cell absorbs, then the ends, then radiances.</summary>
    public int Rows => CellCount + Ends + (ViewBeam >= 0 ? AirCount : 0);

    /// <summary>One source photon, then one emitted in each cell.</summary>
    public int Inputs => CellCount + 1;

    // As many as the nodes of both hemispheres carry, less a tenth: measured, full use makes convergence uneven.
    private static int Moments(int nodes) => (int)(0.9 * nodes) * 2;

    private double[] SourceAmplitudes(Incidence incidence, LayerOrdinates air, int beams, bool withAngles)
    {
        switch (incidence.Kind)
        {
            case IncidenceKind.Lambertian:
                return Lambertian;
            case IncidenceKind.Normal:
                var beam = new double[AirCount];
                beam[SourceBeam] = 1 / Ordinates.FluxRoot[SourceBeam];
                return beam;
            default:
                var profile = incidence.RadianceByAngle!;
                if (withAngles)
                {
                    // Radiance is wanted at each node, not only sums over nodes.
                    double[] seen = [.. air.Cosine.Select(profile.At)];
                    double flux = seen.Select((radiance, j) => radiance * Ordinates.FluxRoot[j] * Ordinates.FluxRoot[j]).Sum();
                    return [.. seen.Select((radiance, j) => radiance * Ordinates.FluxRoot[j] / flux)];
                }

                double[] moments = AngularMoments.Of(profile.At, profile.AnglesDeg, air.Cosine.AsSpan(beams, AirCount - beams));
                double sum = moments.Sum();
                return [.. new double[beams], .. moments.Select((moment, j) => moment / sum / Ordinates.FluxRoot[beams + j])];
        }
    }

    private (double[]? Collect, double Bypass) ReturnWeights(Film film, LayerOrdinates air, int beams, Incidence incidence)
    {
        if (film.Cavity.AboveReflectanceByAngle is not { } table)
            return (null, 0);
        var cosines = air.Cosine.AsSpan(beams, AirCount - beams);
        double[] moments = AngularMoments.Of(table.At, table.AnglesDeg, cosines);
        double[] collect = [.. Ordinates.FluxRoot.Take(beams).Select(root => root * table.At(1)), .. moments.Select((moment, j) => moment / Ordinates.FluxRoot[beams + j])];
        if (incidence.RadianceByAngle is not { } profile)
            return (collect, incidence.Kind == IncidenceKind.Normal ? table.At(1) : moments.Sum() * 2);
        double returned = AngularMoments.Flux(mu => table.At(mu) * profile.At(mu), table.AnglesDeg, profile.AnglesDeg);
        return (collect, returned / AngularMoments.Flux(profile.At, table.AnglesDeg, profile.AnglesDeg));
    }
}

/// <summary>How finely a film is solved.</summary>
/// <param name="Ordinates">Directions in each piece of a hemisphere.</param>
/// <param name="Cells">Depth cells of a layer with dots; a power of two, at least 2.</param>
/// <param name="StepNm">Distance of the wavelengths that are solved where no table over absorption serves; 1 solves each and uses no table.</param>
internal readonly record struct Effort(int Ordinates, int Cells, int StepNm);
