namespace FilmOptics.DiscreteOrdinates;

/// <summary>Directions for a whole film: nodes in n sin θ, which a flat face leaves alone.</summary>
/// <remarks>
/// <para>The range of n sin θ is split at 1 (air) and at each index of the film; each piece has Gauss–Legendre nodes in the
/// cosine of the medium where the piece ends at grazing. A layer uses the nodes that exist in it: the first so many, since
/// nodes rise in n sin θ. Snell's law carries nodes onto nodes, and weight × cosine × n² is the same in every layer.</para>
/// <para>Beams are nodes along the normal with a weight too small to send anything back: a collimated source, or a
/// direction to look from. They come first.</para>
/// </remarks>
internal sealed class OrdinateSet
{
    /// <summary>Weight of a beam in air: what it takes from the light around it stays below rounding.</summary>
    private const double BeamWeight = 1e-14;

    private readonly double[] _pieceIndex;
    private readonly double[] _pieceCosine;

    /// <summary>Nodes for the indices given.</summary>
    /// <param name="indices">Refractive indices in which light may travel obliquely; air is added.</param>
    /// <param name="perPiece">Nodes in each piece.</param>
    /// <param name="beams">Beams along the normal.</param>
    public OrdinateSet(IEnumerable<double> indices, int perPiece, int beams)
    {
        double[] ends = [.. indices.Append(1).Distinct().Order()];
        var (nodes, weights) = GaussLegendre.OnUnitInterval(perPiece);
        List<double> index = [], cosine = [], flux = [];
        for (int beam = 0; beam < beams; beam++)
        {
            index.Add(1);
            cosine.Add(1);
            flux.Add(BeamWeight);
        }

        for (int piece = 0; piece < ends.Length; piece++)
        {
            double n = ends[piece], below = piece == 0 ? 0 : ends[piece - 1];
            double range = Math.Sqrt((n - below) * (n + below)) / n;
            for (int i = perPiece - 1; i >= 0; i--)
            {
                double mu = range * nodes[i];
                index.Add(n);
                cosine.Add(mu);
                flux.Add(range * weights[i] * mu * n * n);
            }
        }

        (BeamCount, AirCount) = (beams, beams + perPiece);
        (_pieceIndex, _pieceCosine) = ([.. index], [.. cosine]);
        FluxRoot = [.. flux.Select(Math.Sqrt)];
    }

    /// <summary>Beams along the normal, at the front.</summary>
    public int BeamCount { get; }

    /// <summary>Nodes that exist in air, beams included.</summary>
    public int AirCount { get; }

    /// <summary>All nodes.</summary>
    public int Count => FluxRoot.Length;

    /// <summary>√(weight × cosine × n²) of each node: the same in every layer.</summary>
    public double[] FluxRoot { get; }

    /// <summary>Nodes of a medium.</summary>
    public LayerOrdinates In(double index)
    {
        int count = 0;
        while (count < Count && _pieceIndex[count] <= index)
            count++;
        var (cosine, fluenceRoot) = (new double[count], new double[count]);
        double weightSum = 0;
        for (int j = 0; j < count; j++)
        {
            // μ² = 1 − (n sin θ / n)², written so that grazing nodes keep their digits.
            double n = _pieceIndex[j], mu = _pieceCosine[j];
            cosine[j] = Math.Sqrt(((index - n) * (index + n)) + (n * n * mu * mu)) / index;
            fluenceRoot[j] = FluxRoot[j] / (index * cosine[j]);
            weightSum += fluenceRoot[j] * fluenceRoot[j] * cosine[j];
        }

        return new(index, count, cosine, fluenceRoot, weightSum);
    }

    /// <summary>Share reflected at a flat face for unpolarised light, at each node that exists on both sides.</summary>
    public static double[] Reflectance(LayerOrdinates below, LayerOrdinates above)
    {
        var shares = new double[Math.Min(below.Count, above.Count)];
        for (int j = 0; j < shares.Length; j++)
        {
            (double near, double far) = (below.Cosine[j], above.Cosine[j]);
            double s = ((below.Index * near) - (above.Index * far)) / ((below.Index * near) + (above.Index * far));
            double p = ((above.Index * near) - (below.Index * far)) / ((above.Index * near) + (below.Index * far));
            shares[j] = ((s * s) + (p * p)) / 2;
        }

        return shares;
    }
}

/// <summary>The nodes of one medium.</summary>
/// <param name="Index">Refractive index.</param>
/// <param name="Count">Nodes that exist in it: the first so many of the film's.</param>
/// <param name="Cosine">Cosine of each node in the medium.</param>
/// <param name="FluenceRoot">√(weight ÷ cosine): what a node adds to the fluence, and takes from emission.</param>
/// <param name="WeightSum">Sum of weights: close to 1, and emission is divided by it so that photons are conserved.</param>
internal sealed record LayerOrdinates(double Index, int Count, double[] Cosine, double[] FluenceRoot, double WeightSum);
