using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Solves a film without re-emission for many optical states: where a source photon and a photon emitted in a cell go.</summary>
internal static class StateSolver<T>
    where T : struct, ILanes<T>
{
    /// <summary>Fills the answers of all states.</summary>
    /// <param name="plan">The film.</param>
    /// <param name="states">The states.</param>
    /// <param name="bypassShare">Source light that misses the film.</param>
    /// <param name="longestFlightMm">Guided light that would fly on for longer comes out at the edges; infinite where none does.</param>
    /// <param name="answers">At [state][row × inputs + input], see <see cref="FilmPlan.Rows"/>.</param>
    /// <param name="cancellationToken">Heeded between batches.</param>
    public static void Solve(
        FilmPlan plan, OpticalStates states, double bypassShare, double longestFlightMm, Span<double> answers, CancellationToken cancellationToken)
    {
        int size = plan.Rows * plan.Inputs;
        LaneArena<T> arena = LaneArena<T>.Rent(), one = LaneArena<T>.Rent(), other = LaneArena<T>.Rent();
        for (int first = 0; first < states.Count; first += T.Count)
        {
            cancellationToken.ThrowIfCancellationRequested();
            var mark = arena.Mark();
            var lanes = new Lanes(states, first);
            var pile = Pile(plan, lanes, longestFlightMm, arena, one, other);
            var closed = CavityClosure<T>.Close(plan, lanes, bypassShare, pile, arena);
            Scatter(closed, answers[(first * size)..], Math.Min(T.Count, states.Count - first), size);
            arena.Release(mark);
            one.Release((0, 0));
            other.Release((0, 0));
        }

        LaneArena<T>.Return(arena);
        LaneArena<T>.Return(one);
        LaneArena<T>.Return(other);
    }

    // Lanes lie side by side; each state's answers lie together.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Scatter(LaneMatrix<T> closed, Span<double> answers, int states, int size)
    {
        int columns = size / closed.Rows;
        for (int row = 0; row < closed.Rows; row++)
        {
            var lanes = MemoryMarshal.Cast<T, double>(closed.Row(row));
            for (int lane = 0; lane < states; lane++)
            {
                var answer = answers.Slice((lane * size) + (row * columns), columns);
                for (int input = 0; input < answer.Length; input++)
                    answer[input] = lanes[(input * T.Count) + lane];
            }
        }
    }

    // Each step needs the pile before it and no other: two arenas take turns, however many layers there are.
    private static LayerPile<T> Pile(FilmPlan plan, Lanes lanes, double longestFlightMm, LaneArena<T> arena, LaneArena<T> here, LaneArena<T> next)
    {
        int layers = plan.Layers.Count, host = plan.AirCount, edge = plan.AirCount + 1;
        bool edges = double.IsFinite(longestFlightMm);
        var edgeLoss = edges ? GuidedLight<T>.EdgeLoss(plan, lanes, longestFlightMm, arena) : default;
        here.Release((0, 0));
        var pile = PileBuilder<T>.Bottom(here, plan.Faces[0], plan.Nodes[0].Count);
        for (int layer = 0; layer < layers; layer++)
        {
            var nodes = plan.Nodes[layer];
            if (layer > 0)
                Step(PileBuilder<T>.Face(next, pile, plan.Faces[layer], nodes.Count), ref pile, ref here, ref next);
            var mark = arena.Mark();
            T scattering = lanes.Scattering(layer);
            LaneMatrix<T> even = default, odd = default;
            if (plan.Layers[layer].Scatters)
            {
                even = arena.Take(nodes.Count, nodes.Count);
                odd = arena.Take(nodes.Count, nodes.Count);
                T forward = plan.Phases[layer].Fill(lanes.Anisotropy(layer), even, odd);
                scattering *= T.All(1) - forward;
            }

            var optics = new LayerOptics<T>
            {
                Absorption = lanes.Absorption(layer),
                Scattering = scattering,
                EdgeLoss = edges ? edgeLoss.Row(layer)[..nodes.Count] : default,
                Even = even,
                Odd = odd,
            };
            var block = LayerBuilder<T>.Build(arena, nodes, optics, plan.Layers[layer].ThicknessMm, Math.Max(1, plan.Cells[layer]));
            Step(PileBuilder<T>.Layer(next, pile, block), ref pile, ref here, ref next);
            T index = T.All(nodes.Index);
            if (edges)
                pile = PileBuilder<T>.Fold(pile, edge, index);
            if (plan.Cells[layer] == 0)
                pile = PileBuilder<T>.Fold(pile, host, index * lanes.Absorption(layer));
            arena.Release(mark);
        }

        return PileBuilder<T>.Face(next, pile, plan.Faces[layers], plan.AirCount);
    }

    private static void Step(LayerPile<T> stepped, ref LayerPile<T> pile, ref LaneArena<T> here, ref LaneArena<T> next)
    {
        if (Unsafe.AreSame(ref stepped.Outer.First, ref pile.Outer.First))
            return;
        here.Release((0, 0));
        (here, next) = (next, here);
        pile = stepped;
    }

    /// <summary>The properties of the states in the lanes.</summary>
    internal readonly ref struct Lanes(OpticalStates states, int first)
    {
        private readonly OpticalStates _states = states;
        private readonly int _first = first;

        public T BelowReflectance => Take(_states.BelowReflectance);

        public T AboveReflectance => Take(_states.AboveReflectance);

        public T AboveAbsorptance => Take(_states.AboveAbsorptance);

        public T Absorption(int layer) => Take(_states.Absorption[layer]);

        public T Scattering(int layer) => Take(_states.Scattering[layer]);

        public T Anisotropy(int layer) => Take(_states.Anisotropy[layer]);

        // The last batch repeats the last state in lanes that have none.
        private T Take(double[] values)
        {
            Span<double> lanes = stackalloc double[T.Count];
            for (int lane = 0; lane < lanes.Length; lane++)
                lanes[lane] = values[Math.Min(_first + lane, values.Length - 1)];
            return T.Load(lanes);
        }
    }
}
