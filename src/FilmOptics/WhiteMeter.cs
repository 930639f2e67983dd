using Colorimetry;

namespace FilmOptics;

/// <summary>Reads white where a target is judged. Made once for a film case, it reads without allocating: the inner loop of a search.</summary>
public sealed class WhiteMeter
{
    // Colour-matching function x transmittance x photon energy, scaled so that ordinary light reads near 1.
    private readonly double[] _x = new double[WavelengthGrid.Count];
    private readonly double[] _y = new double[WavelengthGrid.Count];
    private readonly double[] _z = new double[WavelengthGrid.Count];
    private readonly TargetView _view;

    /// <summary>A meter for one film case.</summary>
    /// <param name="filmCase">Gives the observer, the panel and the target's view.</param>
    /// <param name="place">Film or panel.</param>
    /// <exception cref="ArgumentException">The panel is asked for and there is none.</exception>
    public WhiteMeter(FilmCase filmCase, TargetPlace place)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        if (place == TargetPlace.Panel && filmCase.Panel is null)
            throw new ArgumentException("White at the panel needs a panel.", nameof(place));
        _view = filmCase.Target?.View ?? TargetView.Hemisphere;
        var panel = place == TargetPlace.Panel ? filmCase.Panel : null;
        for (int i = 0; i < _x.Length; i++)
        {
            double transmittance = panel is null
                ? 1
                : (panel.Red.Samples[i] * panel.RedAreaShare) + (panel.Green.Samples[i] * panel.GreenAreaShare) + (panel.Blue.Samples[i] * panel.BlueAreaShare);
            double weight = transmittance * 555.0 / WavelengthGrid.NmAt(i);
            _x[i] = weight * filmCase.Observer.XBar[i];
            _y[i] = weight * filmCase.Observer.YBar[i];
            _z[i] = weight * filmCase.Observer.ZBar[i];
        }
    }

    /// <summary>Tristimulus values of the light that the target's view judges, on a scale of the meter's own: only ratios count.</summary>
    /// <exception cref="InputException">The view is normal and the model has no angles.</exception>
    public Tristimulus Read(FilmOutput output)
    {
        ArgumentNullException.ThrowIfNull(output);
        if (_view == TargetView.Normal)
            return Read(RadianceAlongNormal(output));
        var sum = Read(output.Unconverted);
        foreach (var lot in output.ConvertedByLot)
            sum += Read(lot);
        return sum;
    }

    /// <summary>What a spot meter along the normal receives.</summary>
    /// <exception cref="InputException">The model has no angles.</exception>
    internal static Spectrum<PhotonPerNm> RadianceAlongNormal(FilmOutput output) => output.NormalRadiance ?? throw new InputException(new InputFault(
        "target.view", null, null,
        $"normal asks for the radiance along the normal, which {output.Model} does not give; set hemisphere, or take a model with angles."));

    /// <summary>Tristimulus values of one light, on the same scale.</summary>
    /// <param name="light">Photons in each bin.</param>
    public Tristimulus Read(Spectrum<PhotonPerNm> light)
    {
        ArgumentNullException.ThrowIfNull(light);
        return new(SpectralSum.Of(light.Samples, _x), SpectralSum.Of(light.Samples, _y), SpectralSum.Of(light.Samples, _z));
    }
}
