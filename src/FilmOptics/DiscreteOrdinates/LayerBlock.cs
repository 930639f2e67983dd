namespace FilmOptics.DiscreteOrdinates;

/// <summary>What one homogeneous layer does to light, for the states in the lanes. Its two sides are mirror images.</summary>
/// <remarks>
/// <para>Amplitudes are √(weight × cosine) × radiance, so that reflection and transmission are symmetric and what a cell
/// sends out by emission is the transpose of the fluence that light brings into it.</para>
/// <para>Ports are the cells, bottom to top, and, where guided light can be lost at the edges, one more that collects it.</para>
/// </remarks>
internal readonly ref struct LayerBlock<T>
    where T : struct, ILanes<T>
{
    /// <summary>[reflection, ports out below; ports out below transposed, ports among themselves].</summary>
    public required LaneMatrix<T> Base { get; init; }

    /// <summary>[transmission, ports out above].</summary>
    public required LaneMatrix<T> Through { get; init; }

    /// <summary>Nodes.</summary>
    public required int Nodes { get; init; }

    /// <summary>Cells and the port for the edges.</summary>
    public required int Ports { get; init; }
}

/// <summary>Optical properties of a layer in the lanes, delta-M scaled.</summary>
internal readonly ref struct LayerOptics<T>
    where T : struct, ILanes<T>
{
    /// <summary>1/mm.</summary>
    public required T Absorption { get; init; }

    /// <summary>1/mm, without the forward peak.</summary>
    public required T Scattering { get; init; }

    /// <summary>1/mm by node, guided light only; empty where no light reaches the edges.</summary>
    public required ReadOnlySpan<T> EdgeLoss { get; init; }

    /// <summary>Scattering matrices, even and odd in the cosine; empty for a layer that does not scatter.</summary>
    public required LaneMatrix<T> Even { get; init; }

    /// <inheritdoc cref="Even"/>
    public required LaneMatrix<T> Odd { get; init; }
}
