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
        var arena = LaneArena<T>.Rent();
        for (int first = 0; first < states.Count; first += T.Count)
        {
            cancellationToken.ThrowIfCancellationRequested();
            var mark = arena.Mark();
            var lanes = new Lanes(states, first);
            var pile = Pile(plan, lanes, longestFlightMm, arena);
            var closed = CavityClosure<T>.Close(plan, lanes, bypassShare, double.IsFinite(longestFlightMm), pile, arena);
            Scatter(closed, answers[(first * size)..], Math.Min(T.Count, states.Count - first), size);
            arena.Release(mark);
        }

        LaneArena<T>.Return(arena);
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

    private static LayerPile<T> Pile(FilmPlan plan, Lanes lanes, double longestFlightMm, LaneArena<T> arena)
    {
        int layers = plan.Layers.Count;
        bool edges = double.IsFinite(longestFlightMm);
        var edgeLoss = edges ? GuidedLight<T>.EdgeLoss(plan, lanes, longestFlightMm, arena) : default;
        var pile = PileBuilder<T>.Bottom(arena, plan.Faces[0], plan.Nodes[0].Count);
        for (int layer = 0; layer < layers; layer++)
        {
            var nodes = plan.Nodes[layer];
            if (layer > 0)
                pile = PileBuilder<T>.Face(arena, pile, plan.Faces[layer], nodes.Count);
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
            var block = LayerBuilder<T>.Build(arena, nodes, optics, plan.Layers[layer].ThicknessMm, plan.Cells[layer]);
            pile = PileBuilder<T>.Layer(arena, pile, block);
        }

        return PileBuilder<T>.Face(arena, pile, plan.Faces[layers], plan.AirCount);
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
