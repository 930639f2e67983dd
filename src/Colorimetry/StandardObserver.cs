namespace Colorimetry;

/// <summary>Colour-matching functions on the grid.</summary>
public sealed class StandardObserver
{
    internal StandardObserver(string name, double[] xBar, double[] yBar, double[] zBar) =>
        (Name, _xBar, _yBar, _zBar) = (name, xBar, yBar, zBar);

    private readonly double[] _xBar, _yBar, _zBar;

    /// <summary>Name, such as "CIE 1931 2°".</summary>
    public string Name { get; }

    /// <summary>x̄ at each grid wavelength.</summary>
    public ReadOnlySpan<double> XBar => _xBar;

    /// <summary>ȳ at each grid wavelength.</summary>
    public ReadOnlySpan<double> YBar => _yBar;

    /// <summary>z̄ at each grid wavelength.</summary>
    public ReadOnlySpan<double> ZBar => _zBar;
}
