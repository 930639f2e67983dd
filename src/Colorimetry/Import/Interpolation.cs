namespace Colorimetry;

/// <summary>How a table came to the 1 nm grid.</summary>
public enum Interpolation
{
    /// <summary>Not at all: the table has a row at every whole nanometre.</summary>
    OnGrid,

    /// <summary>Straight lines between rows no more than 1 nm apart, averaged over each nanometre so that areas are kept.</summary>
    Linear,

    /// <summary>Sprague's fifth-degree curve between even steps of 1 to 20 nm (CIE 167:2005).</summary>
    Sprague,

    /// <summary>A cubic curve that neither overshoots nor undershoots its rows (Fritsch and Butland 1984), for uneven or wide steps.</summary>
    Monotone,
}
