using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>States for a film in which only the absorption of one layer depends on the wavelength.</summary>
/// <remarks>
/// The film is solved at Chebyshev nodes in log(a + a₀) between 0 and a largest a; bins take the polynomial through them. One table
/// so serves all wavelengths and all loadings.
/// </remarks>
internal sealed class AbsorptionAxis
{
    // Ranges start at so many per mm and grow by this factor, so that a film's range does not depend on what was solved before.
    private const double SmallestPerMm = 1, RangeFactor = 4;

    private readonly double _startLog;
    private readonly double _halfLog;
    private readonly double _offsetPerMm;
    private readonly double[] _nodes;
    private readonly double[] _barycentric;

    /// <summary>An axis from 0 to a largest absorption.</summary>
    /// <param name="layer">Position of the layer.</param>
    /// <param name="largestPerMm">Largest absorption, 1/mm.</param>
    /// <param name="offsetPerMm">a₀, 1/mm.</param>
    /// <param name="nodes">Chebyshev nodes, a multiple of 8.</param>
    public AbsorptionAxis(int layer, double largestPerMm, double offsetPerMm, int nodes)
    {
        (Layer, _offsetPerMm, _startLog) = (layer, offsetPerMm, Math.Log(offsetPerMm));
        _halfLog = (Math.Log(largestPerMm + offsetPerMm) - _startLog) / 2;
        _nodes = [.. Enumerable.Range(0, nodes).Select(node => -Math.Cos(Angle(node, nodes)))];
        _barycentric = [.. Enumerable.Range(0, nodes).Select(node => (node % 2 == 0 ? 1 : -1) * Math.Sin(Angle(node, nodes)))];
    }

    public int Layer { get; }

    public int Nodes => _nodes.Length;

    /// <summary>Largest of the last two Chebyshev coefficients of any number of the first table: what its polynomials may be wrong by.</summary>
    public double Tail { get; private set; }

    /// <summary>The end of the range that holds an absorption.</summary>
    public static double RangeFor(double absorptionPerMm)
    {
        double end = SmallestPerMm;
        while (end < absorptionPerMm)
            end *= RangeFactor;
        return end;
    }

    /// <summary>Absorption at the nodes, 1/mm.</summary>
    public double[] NodesPerMm() => [.. _nodes.Select(x => Math.Exp(_startLog + ((x + 1) * _halfLog)) - _offsetPerMm)];

    /// <summary>Sets <see cref="Tail"/>.</summary>
    /// <param name="answers">At [node × size + i].</param>
    public double Judge(ReadOnlySpan<double> answers)
    {
        int count = _nodes.Length, size = answers.Length / count;
        double tail = 0;
        var coefficients = new double[size];
        for (int degree = count - 2; degree < count; degree++)
        {
            Array.Clear(coefficients);
            for (int node = 0; node < count; node++)
                LaneAlgebra.AddScaled(coefficients, answers.Slice(node * size, size), 2.0 / count * Math.Cos(degree * Angle(node, count)));
            foreach (double coefficient in coefficients)
                tail = coefficient is >= double.MinValue and <= double.MaxValue ? Math.Max(tail, Math.Abs(coefficient)) : double.PositiveInfinity;
        }

        return Tail = tail;
    }

    /// <summary>Weights of the nodes for each bin's absorption, by the barycentric formula.</summary>
    /// <param name="weights">As wide as there are nodes.</param>
    /// <param name="absorptionPerMm">Absorption of the layer by bin, 1/mm.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Fill(StateWeights weights, ReadOnlySpan<double> absorptionPerMm)
    {
        int lanes = Vector512<double>.Count;
        ref double node = ref _nodes[0];
        ref double factor = ref _barycentric[0];
        ref double target = ref weights.Weights[0];
        for (int bin = 0; bin < absorptionPerMm.Length; bin++)
        {
            var x = Vector512.Create(((Math.Log(absorptionPerMm[bin] + _offsetPerMm) - _startLog) / _halfLog) - 1);
            var sum = Vector512<double>.Zero;
            ref double row = ref Unsafe.Add(ref target, bin * _nodes.Length);
            for (int i = 0; i < _nodes.Length; i += lanes)
            {
                var distance = x - Vector512.LoadUnsafe(ref Unsafe.Add(ref node, i));
                distance = Vector512.ConditionalSelect(Vector512.Equals(distance, Vector512<double>.Zero), Vector512.Create(1e-300), distance);
                var weight = Vector512.LoadUnsafe(ref Unsafe.Add(ref factor, i)) / distance;
                weight.StoreUnsafe(ref Unsafe.Add(ref row, i));
                sum += weight;
            }

            var scale = Vector512.Create(1 / Vector512.Sum(sum));
            for (int i = 0; i < _nodes.Length; i += lanes)
                (Vector512.LoadUnsafe(ref Unsafe.Add(ref row, i)) * scale).StoreUnsafe(ref Unsafe.Add(ref row, i));
        }
    }

    private static double Angle(int node, int count) => Math.PI * ((2 * node) + 1) / (2 * count);
}
