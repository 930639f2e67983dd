namespace FilmOptics;

/// <summary>Where one source photon goes, on average. Counts each photon once, whatever its generation.</summary>
/// <remarks>
/// All figures are shares per source photon. No line is the remainder of the others: each comes from its own flux or
/// absorption, so that <see cref="Sum"/> tests the model. Per-lot lists are in the order of <see cref="Film.Lots"/>.
/// </remarks>
public sealed record PhotonBudget
{
    /// <summary>Source light that leaves above.</summary>
    public required double Unconverted { get; init; }

    /// <summary>Emitted light that leaves above.</summary>
    public required double Converted { get; init; }

    /// <summary>Absorbed by the reflector below.</summary>
    public required double LostBelow { get; init; }

    /// <summary>Absorbed by the sheets above.</summary>
    public required double LostAbove { get; init; }

    /// <summary>Absorbed by the host of any layer.</summary>
    public required double LostInHost { get; init; }

    /// <summary>Guided to the edges of the sheet.</summary>
    public required double LostAtEdges { get; init; }

    /// <summary>Lost without radiation in each lot: (1 − yield) × excitations, all generations.</summary>
    public required IReadOnlyList<double> LostInLots { get; init; }

    /// <summary>Source photons absorbed by each lot: first absorptions only. Not a line of the sum.</summary>
    public required IReadOnlyList<double> SourceAbsorbedBy { get; init; }

    /// <summary>Excitations of each lot, all generations; may exceed 1. Not a line of the sum.</summary>
    public required IReadOnlyList<double> Excitations { get; init; }

    /// <summary>Everything a photon can end as; 1 when the budget closes.</summary>
    public double Sum => Unconverted + Converted + LostBelow + LostAbove + LostInHost + LostAtEdges + LostInLots.Sum();

    /// <summary>This budget, if it closes. NaN never closes.</summary>
    /// <param name="shareTolerance">Largest share that may be missing.</param>
    /// <exception cref="NumericalFailureException">The shares do not sum to 1.</exception>
    public PhotonBudget RequireClosed(double shareTolerance) => Math.Abs(1 - Sum) <= shareTolerance
        ? this
        : throw new NumericalFailureException(
            $"The photon budget sums to {Sum:R}; it has to be 1 within {shareTolerance:g1}.");
}

/// <summary>A computation did not reach a result that can be trusted.</summary>
public sealed class NumericalFailureException : Exception
{
    /// <summary>With what happened.</summary>
    public NumericalFailureException(string message)
        : base(message)
    {
    }
}
