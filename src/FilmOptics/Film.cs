namespace FilmOptics;

/// <summary>Everything that decides where a source photon goes: backlight, cavity, layers and lots. Immutable.</summary>
/// <remarks>
/// Light travels upwards: backlight and <see cref="Cavity.BelowReflectance"/> are below layer 0; the sheets and the panel
/// are above the last layer. Lengths are in mm, coefficients in 1/mm (base e), wavelengths on the 1 nm grid.
/// </remarks>
public sealed record Film
{
    /// <summary>Name of the film, for reports.</summary>
    public required string Title { get; init; }

    /// <summary>The light that reaches the film.</summary>
    public required Backlight Backlight { get; init; }

    /// <summary>What the film sees below and above.</summary>
    public required Cavity Cavity { get; init; }

    /// <summary>Layers, bottom (backlight side) to top; at least one.</summary>
    public required IReadOnlyList<Layer> Layers { get; init; }

    /// <summary>All lots of the film file, used or not. Per-lot results are in this order.</summary>
    public required IReadOnlyList<DotLot> Lots { get; init; }

    /// <summary>Size of the cut sheet, or null for an endless one.</summary>
    public Sheet? Sheet { get; init; }

    /// <summary>Path lengths of the quick model where the file sets them; null takes the physical defaults.</summary>
    public BeerLambertPaths? BeerLambertPaths { get; init; }

    /// <summary>The same film with other loadings.</summary>
    /// <param name="loadingMgPerMl">New loading for a dot entry of a layer, mg per mL of cured layer.</param>
    public Film WithLoadings(Func<Layer, DotLoading, double> loadingMgPerMl)
    {
        ArgumentNullException.ThrowIfNull(loadingMgPerMl);
        return this with
        {
            Layers = [.. Layers.Select(layer =>
                layer.WithDots([.. layer.Dots.Select(dots => dots with { LoadingMgPerMl = loadingMgPerMl(layer, dots) })]))],
        };
    }

    /// <summary>Position of a lot in <see cref="Lots"/>.</summary>
    /// <exception cref="ArgumentException">The lot is not one of this film's.</exception>
    public int IndexOf(DotLot lot)
    {
        ArgumentNullException.ThrowIfNull(lot);
        for (int i = 0; i < Lots.Count; i++)
        {
            if (ReferenceEquals(Lots[i], lot) || string.Equals(Lots[i].Name, lot.Name, StringComparison.Ordinal))
                return i;
        }

        throw new ArgumentException($"Lot '{lot.Name}' is not one of '{Title}'.", nameof(lot));
    }
}

/// <summary>Size of the cut sheet.</summary>
/// <param name="WidthMm">Width, mm, above 0.</param>
/// <param name="HeightMm">Height, mm, above 0; null where only the width is known.</param>
public sealed record Sheet(double WidthMm, double? HeightMm);

/// <summary>Mean path of light through the layer per thickness, for the Beer–Lambert model.</summary>
/// <param name="PumpPathFactor">Source light; at least 1; null takes the physical default of the incidence.</param>
/// <param name="EmissionPathFactor">Emitted light; at least 1; null takes the Lambertian default.</param>
public sealed record BeerLambertPaths(double? PumpPathFactor, double? EmissionPathFactor);
