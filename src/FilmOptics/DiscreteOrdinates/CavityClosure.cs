namespace FilmOptics.DiscreteOrdinates;

/// <summary>Closes what lies outside the bare film: light that leaves to air below or above and comes back.</summary>
/// <remarks>Each return sums the light that arrives with weights by direction and sends it back Lambertian: an operator of rank
/// one over the ordinates of air.</remarks>
internal static class CavityClosure<T>
    where T : struct, ILanes<T>
{
    /// <summary>Rows by input, see <see cref="FilmPlan.Rows"/>.</summary>
    public static LaneMatrix<T> Close(
        FilmPlan plan, StateSolver<T>.Lanes lanes, double bypassShare, LayerPile<T> pile, LaneArena<T> arena)
    {
        int air = plan.AirCount, cells = plan.CellCount, inputs = cells + 3;
        int ports = pile.Outer.Rows - air;
        int below = cells + 1, above = cells + 2;

        // Inputs: the source, each cell's emission, Lambertian light from below and from above.
        var bare = arena.Take(plan.Rows, inputs);
        var down = arena.TakeCleared(air, inputs);
        var up = arena.TakeCleared(air, inputs);
        var inside = arena.TakeCleared(ports, inputs);
        for (int j = 0; j < air; j++)
        {
            for (int k = 0; k < air; k++)
            {
                T fromBelow = pile.Outer[j, k], through = pile.Up[j, k];
                down[j, 0] += fromBelow * T.All(plan.Source[k]);
                up[j, 0] += through * T.All(plan.Source[k]);
                down[j, below] += fromBelow * T.All(plan.Lambertian[k]);
                up[j, below] += through * T.All(plan.Lambertian[k]);
                down[j, above] += pile.Up[k, j] * T.All(plan.Lambertian[k]);
                up[j, above] += pile.Back[j, k] * T.All(plan.Lambertian[k]);
            }
        }

        for (int port = 0; port < ports; port++)
        {
            for (int k = 0; k < air; k++)
            {
                inside[port, 0] += pile.Outer[air + port, k] * T.All(plan.Source[k]);
                inside[port, below] += pile.Outer[air + port, k] * T.All(plan.Lambertian[k]);
                inside[port, above] += pile.Up[k, air + port] * T.All(plan.Lambertian[k]);
            }
        }

        int portOfLayer = PileBuilder<T>.Collectors;
        for (int layer = 0; layer < plan.Layers.Count; layer++)
        {
            var nodes = plan.Nodes[layer];
            double cellMm = plan.Layers[layer].ThicknessMm / plan.Cells[layer];
            T emitted = T.All(1 / (2 * nodes.Index * cellMm * nodes.WeightSum));
            for (int cell = 0; cell < plan.Cells[layer]; cell++)
            {
                int input = 1 + plan.FirstCell[layer] + cell;
                for (int j = 0; j < air; j++)
                {
                    down[j, input] = pile.Outer[j, air + portOfLayer + cell] * emitted;
                    up[j, input] = pile.Up[j, air + portOfLayer + cell] * emitted;
                }

                for (int port = 0; port < ports; port++)
                    inside[port, input] = pile.Outer[air + port, air + portOfLayer + cell] * emitted;
            }

            portOfLayer += plan.Cells[layer];
        }

        // Light that arrives below and above for each input, and what of it the sheets above send back.
        var arrivesBelow = arena.TakeCleared(1, inputs);
        var arrivesAbove = arena.TakeCleared(1, inputs);
        var returned = arena.TakeCleared(1, inputs);
        for (int j = 0; j < air; j++)
        {
            T collect = T.All(plan.Collect[j]);
            T send = plan.ReturnCollect is { } byAngle ? T.All(byAngle[j]) : collect * lanes.AboveReflectance;
            for (int input = 0; input < inputs; input++)
            {
                arrivesBelow[0, input] += collect * down[j, input];
                arrivesAbove[0, input] += collect * up[j, input];
                returned[0, input] += send * up[j, input];
            }
        }

        T reflectBelow = lanes.BelowReflectance, lostAbove = lanes.AboveAbsorptance;
        T bypassReturn = plan.ReturnCollect is null ? lanes.AboveReflectance : T.All(plan.BypassReturn);
        T a11 = T.All(1) - (reflectBelow * arrivesBelow[0, below]), a12 = reflectBelow * arrivesBelow[0, above];
        T a21 = returned[0, below], a22 = T.All(1) - returned[0, above];
        T determinant = T.All(1) / ((a11 * a22) - (a12 * a21));
        for (int input = 0; input <= cells; input++)
        {
            T share = T.All(input == 0 ? 1 - bypassShare : 1), missed = T.All(input == 0 ? bypassShare : 0);
            T toBelow = share * reflectBelow * arrivesBelow[0, input], toAbove = (share * returned[0, input]) + (missed * bypassReturn);
            T fromBelow = ((a22 * toBelow) + (a12 * toAbove)) * determinant, fromAbove = ((a21 * toBelow) + (a11 * toAbove)) * determinant;

            T Sum(LaneMatrix<T> matrix, int row) =>
                (share * matrix[row, input]) + (fromBelow * matrix[row, below]) + (fromAbove * matrix[row, above]);

            T atBelow = Sum(arrivesBelow, 0), atAbove = Sum(arrivesAbove, 0) + missed;
            T sentBack = Sum(returned, 0) + (missed * bypassReturn);
            bare[cells, input] = plan.ReturnCollect is null
                ? atAbove * (T.All(1) - lanes.AboveReflectance - lostAbove)
                : atAbove - sentBack - (atAbove * lostAbove);
            bare[cells + 1, input] = atBelow * (T.All(1) - reflectBelow);
            bare[cells + 2, input] = atAbove * lostAbove;
            bare[cells + 3, input] = Sum(inside, 1);
            bare[cells + 4, input] = Sum(inside, 0);
            int port = PileBuilder<T>.Collectors;
            for (int layer = 0; layer < plan.Layers.Count; layer++)
            {
                T taken = T.All(plan.Nodes[layer].Index) * lanes.Absorption(layer);
                for (int cell = 0; cell < plan.Cells[layer]; cell++)
                    bare[plan.FirstCell[layer] + cell, input] = taken * Sum(inside, port++);
            }

            for (int row = cells + FilmPlan.Ends; row < plan.Rows; row++)
                bare[row, input] = Sum(up, row - cells - FilmPlan.Ends);
        }

        return bare;
    }
}
