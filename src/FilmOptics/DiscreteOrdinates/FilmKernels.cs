namespace FilmOptics.DiscreteOrdinates;

/// <summary>Where a source photon and a photon emitted in a cell go, at each state of a film.</summary>
/// <param name="Plan">Directions and cells.</param>
/// <param name="States">How many states there are.</param>
/// <param name="Answers">At [state][row × inputs + input], see <see cref="FilmPlan.Rows"/>.</param>
internal sealed record FilmKernels(FilmPlan Plan, int States, double[] Answers)
{
    /// <summary>Numbers per state.</summary>
    public int Size => Plan.Rows * Plan.Inputs;

    /// <summary>The numbers of a state.</summary>
    public ReadOnlySpan<double> Of(int state) => Answers.AsSpan(state * Size, Size);
}
