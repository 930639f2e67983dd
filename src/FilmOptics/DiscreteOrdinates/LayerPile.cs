namespace FilmOptics.DiscreteOrdinates;

/// <summary>Layers joined from the bottom up: what the pile so far does to light from outside, from its cells and from above.</summary>
/// <remarks>Outer ports are the air below, then the ports of each layer, then the air above once the pile is closed.</remarks>
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
