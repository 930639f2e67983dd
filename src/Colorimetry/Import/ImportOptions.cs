namespace Colorimetry;

/// <summary>What stands in for values outside a table's range.</summary>
public enum OutsideRule
{
    /// <summary>Nothing: light must have fallen off at the table's ends, anything else must cover what is needed.</summary>
    Refuse,

    /// <summary>Zero.</summary>
    Zero,

    /// <summary>The value of the nearest row. Not for light.</summary>
    Hold,
}

/// <summary>How a column is brought to the grid, as the film file's mapping says it.</summary>
public sealed record ImportOptions
{
    /// <summary>All defaults.</summary>
    public static ImportOptions Default { get; } = new();

    /// <summary>What stands in for values outside the table's range (<c>outside</c>).</summary>
    public OutsideRule Outside { get; init; }

    /// <summary>Added to every wavelength before anything else, nm, −200 to 200 (<c>shift_nm</c>).</summary>
    public double ShiftNm { get; init; }

    /// <summary>Every value is multiplied by this, above 0 (<c>scale</c>).</summary>
    public double ScaleFactor { get; init; } = 1;

    /// <summary>In place of a scale: a wavelength (after the shift) and the value that the spectrum has there (<c>at_nm</c>, <c>value</c>).</summary>
    public (double AtNm, double Value)? Anchor { get; init; }

    /// <summary>
    /// Where there is light, nm: what a filter, an absorbance or a coefficient must cover under <see cref="OutsideRule.Refuse"/>.
    /// Null is the whole grid. Beyond it, where no light asks, the value of the nearest row stands. Light itself takes no notice of it.
    /// </summary>
    public (double FirstNm, double LastNm)? NeededNm { get; init; }
}
