namespace FilmOptics.DiscreteOrdinates;

/// <summary>Henyey–Greenstein scattering between the nodes of a layer, split even and odd in the cosine.</summary>
/// <remarks>
/// Delta-M (Wiscombe 1977): the peak that the nodes cannot resolve counts as unscattered. What the quadrature then
/// misses of a direction's photons is put back straight ahead, so that each direction scatters exactly what it loses: without
/// that the budget would not close. Scaling rows and columns instead was tried: the same for diffuse light, worse for a beam.
/// </remarks>
internal sealed class PhaseMatrices
{
    private readonly LayerOrdinates _nodes;
    private readonly double[][] _legendre;

    /// <summary>For the nodes of a layer.</summary>
    /// <param name="nodes">Directions.</param>
    /// <param name="moments">Legendre moments kept, even.</param>
    public PhaseMatrices(LayerOrdinates nodes, int moments)
    {
        _nodes = nodes;
        _legendre = new double[moments][];
        for (int l = 0; l < moments; l++)
        {
            _legendre[l] = new double[nodes.Count];
            for (int j = 0; j < nodes.Count; j++)
            {
                double mu = nodes.Cosine[j];
                _legendre[l][j] = l switch
                {
                    0 => 1,
                    1 => mu,
                    _ => ((((2 * l) - 1) * mu * _legendre[l - 1][j]) - ((l - 1) * _legendre[l - 2][j])) / l,
                };
            }
        }
    }

    /// <summary>Fills both matrices for the anisotropies in the lanes.</summary>
    /// <returns>Share of scattering that counts as unscattered.</returns>
    public T Fill<T>(T anisotropy, LaneMatrix<T> even, LaneMatrix<T> odd)
        where T : struct, ILanes<T>
    {
        int n = _nodes.Count;
        T forward = T.All(1);
        for (int l = 0; l < _legendre.Length; l++)
            forward *= anisotropy;
        even.Clear();
        odd.Clear();
        T moment = T.All(1);
        T scale = T.All(1) / (T.All(1) - forward);
        for (int l = 0; l < _legendre.Length; l++)
        {
            T weight = T.All((2 * l) + 1) * (moment - forward) * scale;
            var matrix = l % 2 == 0 ? even : odd;
            double[] legendre = _legendre[l];
            for (int j = 0; j < n; j++)
            {
                T left = weight * T.All(legendre[j]);
                for (int k = j; k < n; k++)
                    matrix[j, k] = T.MultiplyAdd(left, T.All(legendre[k]), matrix[j, k]);
            }

            moment *= anisotropy;
        }

        even.MirrorUpper();
        odd.MirrorUpper();
        Conserve(even, odd);
        return forward;
    }

    private void Conserve<T>(LaneMatrix<T> even, LaneMatrix<T> odd)
        where T : struct, ILanes<T>
    {
        for (int j = 0; j < _nodes.Count; j++)
        {
            T scattered = default;
            for (int k = 0; k < _nodes.Count; k++)
                scattered += T.All(Weight(k)) * even[j, k];
            T correction = (T.All(1) - scattered) / T.All(Weight(j));
            even[j, j] += correction;
            odd[j, j] += correction;
        }
    }

    private double Weight(int j) => _nodes.FluenceRoot[j] * _nodes.FluenceRoot[j] * _nodes.Cosine[j];
}
