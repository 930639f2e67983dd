using Colorimetry;

namespace FilmOptics;

/// <summary>A model of light in a film. One film file runs on every model.</summary>
public interface IFilmModel
{
    /// <summary>Name as users write it: beer-lambert, discrete-ordinates, monte-carlo.</summary>
    string Name { get; }

    /// <summary>Finds where each source photon goes.</summary>
    /// <param name="film">The film. A model may keep what does not depend on loadings for the next call.</param>
    /// <param name="cancellationToken">Stops long work.</param>
    /// <exception cref="NumericalFailureException">The budget does not close or the model does not converge.</exception>
    FilmOutput Solve(Film film, CancellationToken cancellationToken = default);
}

/// <summary>Light leaving above the sheets, per source photon, with the budget and the model that produced it.</summary>
public sealed record FilmOutput
{
    /// <summary>Name of the model.</summary>
    public required string Model { get; init; }

    /// <summary>Source light leaving above, photons per source photon in each 1 nm bin.</summary>
    public required Spectrum<PhotonPerNm> Unconverted { get; init; }

    /// <summary>Emitted light leaving above by last emitting lot, in the order of <see cref="Film.Lots"/>.</summary>
    public required IReadOnlyList<Spectrum<PhotonPerNm>> ConvertedByLot { get; init; }

    /// <summary>
    /// The film's own light along the normal, before the sheets above: photons per source photon, nm and steradian. Null from a model
    /// without angles, and for a collimated source. What <see cref="TargetView.Normal"/> judges.
    /// </summary>
    public Spectrum<PhotonPerNm>? NormalRadiance { get; init; }

    /// <summary>Light against the exit angle, where it was asked for.</summary>
    public AngularOutput? Angles { get; init; }

    /// <summary>Where every photon went.</summary>
    public required PhotonBudget Budget { get; init; }

    /// <summary>What the model could not take into account, or found worth saying.</summary>
    public IReadOnlyList<string> Warnings { get; init; } = [];

    /// <summary>Accuracy asked for and reached, for models that have one.</summary>
    public SolverAccuracy? Accuracy { get; init; }

    /// <summary>Photons traced and standard errors, for models that trace.</summary>
    public TracingStatistics? Tracing { get; init; }

    /// <summary>All light leaving above, photons per source photon in each 1 nm bin.</summary>
    public Spectrum<PhotonPerNm> Total
    {
        get
        {
            var sum = Unconverted.Samples.ToArray();
            foreach (var lot in ConvertedByLot)
            {
                for (int i = 0; i < sum.Length; i++)
                    sum[i] += lot.Samples[i];
            }

            return Spectrum.FromSamples<PhotonPerNm>(sum, $"light above ({Model})");
        }
    }
}

/// <summary>What was asked of a solver, what it estimates to have reached, and the effort it took.</summary>
/// <param name="AskedShare">Largest error asked for, of any budget line and of u′v′.</param>
/// <param name="EstimateShare">The solver's own estimate of its largest error.</param>
/// <param name="Ordinates">Directions per hemisphere.</param>
/// <param name="Cells">Depth cells.</param>
/// <param name="WavelengthBins">Wavelengths solved; where one table over absorption serves them all, its nodes.</param>
public sealed record SolverAccuracy(double AskedShare, double EstimateShare, int Ordinates, int Cells, int WavelengthBins);
