using Colorimetry;

namespace FilmOptics;

/// <summary>The film's own light against the exit angle in air, before the sheets above. A collimated beam is left out.</summary>
/// <param name="AnglesDeg">Polar angles in air, degrees, rising from 0, the normal.</param>
/// <param name="Radiance">At each of them: photons per source photon, nm, steradian and area seen along that direction.</param>
public sealed record AngularOutput(IReadOnlyList<double> AnglesDeg, IReadOnlyList<Spectrum<PhotonPerNm>> Radiance);
