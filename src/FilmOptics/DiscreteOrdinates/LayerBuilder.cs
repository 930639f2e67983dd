namespace FilmOptics.DiscreteOrdinates;

/// <summary>Builds layers: a thin slice from a rational form of the exact solution, then doubling.</summary>
/// <remarks>
/// Adding–doubling after van de Hulst; the rational form is the continued fraction of tanh, which conserves photons exactly
/// at any order. Doubling keeps the even and the odd half of the mirror-symmetric pair apart: each needs one Cholesky factor.
/// </remarks>
internal static class LayerBuilder<T>
    where T : struct, ILanes<T>
{
    /// <summary>Largest extinction × half thickness ÷ cosine of the first slice: tanh is then good to 2e-7.</summary>
    private const double LargestHalfDepth = 1.2;

    /// <summary>A layer of equal cells.</summary>
    /// <param name="arena">Holds the result and the scratch.</param>
    /// <param name="nodes">Directions.</param>
    /// <param name="optics">Properties.</param>
    /// <param name="thicknessMm">Thickness, mm.</param>
    /// <param name="cells">A power of two.</param>
    public static LayerBlock<T> Build(LaneArena<T> arena, LayerOrdinates nodes, LayerOptics<T> optics, double thicknessMm, int cells)
    {
        double largest = 0;
        for (int lane = 0; lane < T.Count; lane++)
            largest = Math.Max(largest, (optics.Absorption + optics.Scattering)[lane]);
        double cellMm = thicknessMm / cells;
        if (optics.Even.Rows == 0)
            return ClearLayer<T>.Build(arena, nodes, optics, cellMm, cells);
        double smallestCosine = nodes.Cosine[nodes.Count - 1];
        int halvings = 0;
        while (largest * cellMm / (2 * smallestCosine) > LargestHalfDepth * (1L << halvings))
            halvings++;
        var block = Slice(arena, nodes, optics, cellMm / (1L << halvings));
        for (int i = 0; i < halvings; i++)
            block = Double(arena, block, edgePort: optics.EdgeLoss.Length > 0, split: false);
        for (int count = 1; count < cells; count *= 2)
            block = Double(arena, block, edgePort: optics.EdgeLoss.Length > 0, split: true);
        return block;
    }

    // With E = up + down and O = up − down:  dE/dz = −P O,  dO/dz = −Q E + 2 p v.  Across a slice of half thickness x, even light has
    // O = −x tanhc(x²QP) Q E + …, odd light E = −x tanhc(x²PQ) P O.
    private static LayerBlock<T> Slice(LaneArena<T> arena, LayerOrdinates nodes, LayerOptics<T> optics, double sliceMm)
    {
        int n = nodes.Count, ports = optics.EdgeLoss.Length > 0 ? 2 : 1;
        double half = sliceMm / 2;
        T x = T.All(half);
        var result = arena.Take(n + ports, n + ports);
        var through = arena.Take(n, n + ports);
        var mark = arena.Mark();
        var p = arena.Take(n, n);
        var q = arena.Take(n, n);
        var v = arena.Take(n, ports);
        for (int j = 0; j < n; j++)
        {
            for (int k = 0; k < n; k++)
            {
                T root = T.All(nodes.FluenceRoot[j] * nodes.FluenceRoot[k] * half) * optics.Scattering;
                (p[j, k], q[j, k]) = (-(root * optics.Odd[j, k]), -(root * optics.Even[j, k]));
            }

            T extinction = optics.Absorption + optics.Scattering;
            v[j, 0] = T.All(nodes.FluenceRoot[j]);
            if (ports > 1)
            {
                extinction += optics.EdgeLoss[j];
                v[j, 1] = optics.EdgeLoss[j] * v[j, 0];
            }

            extinction *= T.All(half / nodes.Cosine[j]);
            (p[j, j], q[j, j]) = (p[j, j] + extinction, q[j, j] + extinction);
        }

        // tanhc(X) = N/D with N = 945 + 105 X + X², D = 945 + 420 X + 15 X², X = QP (p and q hold x already).
        var power = arena.Take(n, n);
        var square = arena.Take(n, n);
        var numerator = arena.Take(n, n);
        var denominator = arena.Take(n, n);
        LaneAlgebra.Multiply(power, q, p);
        LaneAlgebra.Multiply(square, power, power);
        for (int j = 0; j < n; j++)
        {
            for (int k = 0; k < n; k++)
            {
                T one = T.All(j == k ? 945 : 0);
                numerator[j, k] = one + (T.All(105) * power[j, k]) + square[j, k];
                denominator[j, k] = one + (T.All(420) * power[j, k]) + (T.All(15) * square[j, k]);
            }
        }

        // Even light: (D + N q) answer = [N q | N v]. Odd light: (Dᵀ + Nᵀ p) answer = Nᵀ p.
        var even = arena.Take(n, n + ports);
        var odd = arena.Take(n, n);
        LaneAlgebra.Multiply(even.Block(0, 0, n, n), numerator, q);
        LaneAlgebra.Multiply(even.Block(0, n, n, ports), numerator, v);
        LaneAlgebra.Multiply(odd, numerator, p, leftTransposed: true);
        var evenMatrix = arena.Take(n, n);
        var oddMatrix = arena.Take(n, n);
        var self = arena.Take(n, 2 * ports);
        for (int j = 0; j < n; j++)
        {
            for (int k = 0; k < n; k++)
            {
                evenMatrix[j, k] = denominator[j, k] + even[j, k];
                oddMatrix[j, k] = denominator[k, j] + odd[j, k];
            }

            for (int port = 0; port < ports; port++)
            {
                T sum = T.All(315) * v[j, port];
                for (int k = 0; k < n; k++)
                    sum += T.All(14) * power[j, k] * v[k, port];
                (self[j, port], self[j, ports + port]) = (even[j, n + port], sum);
            }
        }

        LaneAlgebra.Solve(evenMatrix, even);
        LaneAlgebra.Solve(oddMatrix, odd);
        LaneAlgebra.Solve(denominator, self);
        for (int j = 0; j < n; j++)
        {
            for (int k = 0; k < n; k++)
            {
                result[j, k] = odd[j, k] - even[j, k];
                through[j, k] = T.All(j == k ? 1 : 0) - even[j, k] - odd[j, k];
            }

            for (int port = 0; port < ports; port++)
                result[j, n + port] = result[n + port, j] = through[j, n + port] = T.All(sliceMm) * even[j, n + port];
        }

        // Fluence of a port in its own emission: 2x [tanhc v · out + 2 x² v · P (1 − tanhc)/X v].
        for (int one = 0; one < ports; one++)
        {
            for (int other = 0; other < ports; other++)
            {
                T sum = default;
                for (int j = 0; j < n; j++)
                {
                    sum += self[j, one] * result[j, n + other];
                    T spread = default;
                    for (int k = 0; k < n; k++)
                        spread += p[j, k] * v[k, one];
                    sum += T.All(2) * x * spread * self[j, ports + other];
                }

                result[n + one, n + other] = T.All(sliceMm) * sum;
            }
        }

        arena.Release(mark);
        return new() { Base = result, Through = through, Nodes = n, Ports = ports };
    }

    // Two equal blocks, one on the other. Split: their cells stay apart; else they become one.
    private static LayerBlock<T> Double(LaneArena<T> arena, LayerBlock<T> block, bool edgePort, bool split)
    {
        int n = block.Nodes, ports = block.Ports, width = n + ports;
        int cells = edgePort ? ports - 1 : ports;
        int newCells = split ? 2 * cells : cells;
        int newPorts = newCells + ports - cells;
        var result = arena.Take(n + newPorts, n + newPorts);
        var through = arena.Take(n, n + newPorts);
        var mark = arena.Mark();
        var even = arena.Take(width, width);
        var odd = arena.Take(width, width);
        var factor = arena.Take(n, n);
        var solved = arena.Take(n, width);
        Half(block, even, factor, solved, sign: 1);
        Half(block, odd, factor, solved, sign: -1);
        T half = T.All(0.5);
        for (int row = 0; row < width; row++)
        {
            int lower = Place(row, n, cells, newCells, split, mirrored: false), upper = Place(row, n, cells, newCells, split, mirrored: true);
            for (int column = row; column < width; column++)
            {
                (T e, T o) = (even[row, column], odd[row, column]);
                int same = Place(column, n, cells, newCells, split, mirrored: false), across = Place(column, n, cells, newCells, split, mirrored: true);
                bool rowPaired = row < n || (split && row < n + cells), columnPaired = column < n || (split && column < n + cells);
                if (!rowPaired)
                {
                    // Both are ports of the whole: what both halves give.
                    Set(result, lower, same, e + e);
                }
                else if (!columnPaired)
                {
                    Set(result, lower, same, e);
                    if (row >= n)
                        Set(result, upper, same, e);
                    else
                        through[row, same] = e;
                }
                else
                {
                    (T near, T far) = (half * (e + o), half * (e - o));
                    if (row < n && column < n)
                    {
                        Set(result, row, column, near);
                        through[row, column] = through[column, row] = far;
                    }
                    else if (row < n)
                    {
                        // A cell of the lower half goes out below as "near"; its mirror image goes out above.
                        Set(result, row, same, near);
                        Set(result, row, across, far);
                        (through[row, across], through[row, same]) = (near, far);
                    }
                    else
                    {
                        Set(result, lower, same, near);
                        Set(result, upper, across, near);
                        Set(result, lower, across, far);
                        Set(result, upper, same, far);
                    }
                }
            }
        }

        arena.Release(mark);
        return new() { Base = result, Through = through, Nodes = n, Ports = newPorts };
    }

    private static int Place(int index, int nodes, int cells, int newCells, bool split, bool mirrored)
    {
        int cell = index - nodes;
        return cell < 0 || !split ? index
            : cell >= cells ? nodes + newCells + cell - cells
            : mirrored ? nodes + newCells - 1 - cell
            : index;
    }

    private static void Set(LaneMatrix<T> matrix, int row, int column, T value) => matrix[row, column] = matrix[column, row] = value;

    // base ± throughᵀ (1 ∓ R)⁻¹ through: the half film with a mirror (+) or an absorbing antimirror (−) in the middle.
    private static void Half(LayerBlock<T> block, LaneMatrix<T> half, LaneMatrix<T> factor, LaneMatrix<T> solved, int sign)
    {
        int n = block.Nodes;
        for (int j = 0; j < n; j++)
        {
            for (int k = 0; k <= j; k++)
            {
                T r = block.Base[j, k];
                factor[j, k] = T.All(j == k ? 1 : 0) + (sign > 0 ? -r : r);
            }
        }

        block.Base.CopyTo(half);
        block.Through.CopyTo(solved);
        LaneAlgebra.Cholesky(factor);
        LaneAlgebra.SolveLower(factor, solved);
        LaneAlgebra.Multiply(half, solved, solved, sign > 0 ? Into.Add : Into.Subtract, leftTransposed: true, upperOnly: true);
    }
}
