namespace FilmOptics.DiscreteOrdinates;

/// <summary>Joins layers and faces.</summary>
internal static class PileBuilder<T>
    where T : struct, ILanes<T>
{
    /// <summary>Ports behind those of air that every pile has: what layers without dots absorb, what the edges take.</summary>
    public const int Collectors = 2;

    /// <summary>The air below, up to and with the face to the first layer.</summary>
    /// <param name="arena">Holds the result.</param>
    /// <param name="reflected">Share reflected at each node of air.</param>
    /// <param name="nodes">Nodes of the layer, at least those of air.</param>
    public static LayerPile<T> Bottom(LaneArena<T> arena, double[] reflected, int nodes)
    {
        int air = reflected.Length;
        var outer = arena.TakeCleared(air + Collectors, air + Collectors);
        var up = arena.TakeCleared(nodes, air + Collectors);
        var back = arena.TakeCleared(nodes, nodes);
        for (int j = 0; j < nodes; j++)
        {
            back[j, j] = T.All(j < air ? reflected[j] : 1);
            if (j < air)
                (outer[j, j], up[j, j]) = (T.All(reflected[j]), T.All(1 - reflected[j]));
        }

        return new() { Outer = outer, Up = up, Back = back };
    }

    /// <summary>The pile with a face on it: nodes that do not exist behind it are reflected whole.</summary>
    /// <param name="arena">Holds the result.</param>
    /// <param name="pile">The pile.</param>
    /// <param name="reflected">Share reflected at the nodes that exist on both sides.</param>
    /// <param name="nodes">Nodes behind the face.</param>
    public static LayerPile<T> Face(LaneArena<T> arena, LayerPile<T> pile, double[] reflected, int nodes)
    {
        int inside = pile.Back.Rows, ports = pile.Outer.Rows, shared = reflected.Length;
        if (inside == nodes && Array.TrueForAll(reflected, share => share == 0))
            return pile;
        var outer = arena.Take(ports, ports);
        var up = arena.TakeCleared(nodes, ports);
        var back = arena.TakeCleared(nodes, nodes);
        var mark = arena.Mark();
        var factor = arena.Take(inside, inside);
        var solved = arena.Take(inside, shared + ports);
        var sum = arena.Take(shared + ports, shared + ports);
        for (int j = 0; j < inside; j++)
        {
            double root = j < shared ? Math.Sqrt(reflected[j]) : 1;
            for (int k = 0; k < inside; k++)
            {
                double other = k < shared ? Math.Sqrt(reflected[k]) : 1;
                factor[j, k] = T.All(j == k ? 1 : 0) - (T.All(root * other) * pile.Back[j, k]);
                if (k < shared)
                    solved[j, k] = T.All(root * (1 - reflected[k])) * pile.Back[j, k];
            }

            for (int port = 0; port < ports; port++)
                solved[j, shared + port] = T.All(root) * pile.Up[j, port];
        }

        LaneAlgebra.Cholesky(factor);
        LaneAlgebra.SolveLower(factor, solved);
        LaneAlgebra.Multiply(sum, solved, solved, leftTransposed: true, upperOnly: true);
        sum.MirrorUpper();
        for (int j = 0; j < nodes; j++)
        {
            if (j >= shared)
            {
                back[j, j] = T.All(1);
                continue;
            }

            T passed = T.All(1 - reflected[j]);
            for (int k = 0; k < shared; k++)
                back[j, k] = (passed * T.All(1 - reflected[k]) * pile.Back[j, k]) + sum[j, k] + T.All(j == k ? reflected[j] : 0);
            for (int port = 0; port < ports; port++)
                up[j, port] = (passed * pile.Up[j, port]) + sum[j, shared + port];
        }

        for (int one = 0; one < ports; one++)
        {
            for (int other = 0; other < ports; other++)
                outer[one, other] = pile.Outer[one, other] + sum[shared + one, shared + other];
        }

        arena.Release(mark);
        return new() { Outer = outer, Up = up, Back = back };
    }

    /// <summary>Adds what the last port takes to a collector, and drops the port.</summary>
    /// <param name="pile">The pile; its collector changes.</param>
    /// <param name="collector">Position among the outer ports.</param>
    /// <param name="factor">What a photon's fluence in the port counts.</param>
    public static LayerPile<T> Fold(LayerPile<T> pile, int collector, T factor)
    {
        int last = pile.Outer.Rows - 1, nodes = pile.Up.Rows;
        for (int port = 0; port < last; port++)
            pile.Outer[collector, port] = pile.Outer[port, collector] = pile.Outer[collector, port] + (factor * pile.Outer[last, port]);
        for (int j = 0; j < nodes; j++)
            pile.Up[j, collector] += factor * pile.Up[j, last];
        return new() { Outer = pile.Outer.Block(0, 0, last, last), Up = pile.Up.Block(0, 0, nodes, last), Back = pile.Back };
    }

    /// <summary>The pile with a layer on it.</summary>
    public static LayerPile<T> Layer(LaneArena<T> arena, LayerPile<T> pile, LayerBlock<T> block)
    {
        int n = block.Nodes, old = pile.Outer.Rows, added = block.Ports, ports = old + added;
        var outer = arena.Take(ports, ports);
        var up = arena.Take(n, ports);
        var back = arena.Take(n, n);
        var mark = arena.Mark();

        // Between pile and layer: rising = (1 − back·R)⁻¹ (up from the pile + back · what the layer sends down).
        var matrix = arena.Take(n, n);
        var rising = arena.Take(n, old + added + n);
        var down = arena.Take(n, added + n);
        var reflection = block.Base.Block(0, 0, n, n);
        block.Base.Block(0, n, n, added).CopyTo(down.Block(0, 0, n, added));
        block.Through.Block(0, 0, n, n).CopyTo(down.Block(0, added, n, n));
        LaneAlgebra.Multiply(matrix, pile.Back, reflection);
        for (int j = 0; j < n; j++)
        {
            for (int k = 0; k < n; k++)
                matrix[j, k] = T.All(j == k ? 1 : 0) - matrix[j, k];
        }

        pile.Up.CopyTo(rising.Block(0, 0, n, old));
        LaneAlgebra.Multiply(rising.Block(0, old, n, added + n), pile.Back, down);
        LaneAlgebra.Solve(matrix, rising);

        var falling = arena.Take(n, old);
        LaneAlgebra.Multiply(falling, reflection, rising.Block(0, 0, n, old));
        pile.Outer.CopyTo(outer.Block(0, 0, old, old));
        LaneAlgebra.Multiply(outer.Block(0, 0, old, old), pile.Up, falling, Into.Add, leftTransposed: true);

        // The layer's own ports and its upper side answer to what rises into it.
        var answer = arena.Take(added + n, old + added + n);
        LaneAlgebra.Multiply(answer, down, rising, leftTransposed: true);
        for (int port = 0; port < added; port++)
        {
            for (int other = 0; other < old; other++)
                outer[old + port, other] = outer[other, old + port] = answer[port, other];
            for (int other = 0; other < added; other++)
                outer[old + port, old + other] = block.Base[n + port, n + other] + answer[port, old + other];
        }

        for (int j = 0; j < n; j++)
        {
            for (int port = 0; port < old; port++)
                up[j, port] = answer[added + j, port];
            for (int port = 0; port < added; port++)
                up[j, old + port] = block.Through[j, n + port] + answer[added + j, old + port];
            for (int k = 0; k < n; k++)
                back[j, k] = reflection[j, k] + answer[added + j, old + added + k];
        }

        arena.Release(mark);
        return new() { Outer = outer, Up = up, Back = back };
    }
}
