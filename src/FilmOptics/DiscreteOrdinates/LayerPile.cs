namespace FilmOptics.DiscreteOrdinates;

/// <summary>Layers joined from the bottom up: what the pile so far does to light from outside, from its cells and from above.</summary>
/// <remarks>Outer ports are the air below, then what layers without dots absorb, then what the edges take, then the cells of the layers with dots.</remarks>
internal readonly ref struct LayerPile<T>
    where T : struct, ILanes<T>
{
    /// <summary>Outer ports among themselves, symmetric.</summary>
    public required LaneMatrix<T> Outer { get; init; }

    /// <summary>Light up out of the pile, by node, from each outer port; and its transpose.</summary>
    public required LaneMatrix<T> Up { get; init; }

    /// <summary>Light from above that the pile sends back up, by node.</summary>
    public required LaneMatrix<T> Back { get; init; }
}
