using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>How far two outputs of one film lie apart: the largest difference of any budget line and of u′v′ of the light above.</summary>
internal static class OutputError
{
    private static readonly Spectrum<WattPerNm> X = PerPhoton(StandardObserver.Cie1931.XBar), Y = PerPhoton(StandardObserver.Cie1931.YBar),
        Z = PerPhoton(StandardObserver.Cie1931.ZBar);

    public static double Between(FilmOutput one, FilmOutput other)
    {
        var (a, b) = (one.Budget, other.Budget);
        double largest = 0;
        void Compare(double left, double right) => largest = Math.Max(largest, Math.Abs(left - right));
        Compare(a.Unconverted, b.Unconverted);
        Compare(a.Converted, b.Converted);
        Compare(a.LostBelow, b.LostBelow);
        Compare(a.LostAbove, b.LostAbove);
        Compare(a.LostInHost, b.LostInHost);
        Compare(a.LostAtEdges, b.LostAtEdges);
        for (int lot = 0; lot < a.LostInLots.Count; lot++)
        {
            Compare(a.LostInLots[lot], b.LostInLots[lot]);
            Compare(one.ConvertedByLot[lot].Integral, other.ConvertedByLot[lot].Integral);
            Compare(a.SourceAbsorbedBy[lot], b.SourceAbsorbedBy[lot]);
        }

        var (left, right) = (ColourOf(one), ColourOf(other));
        if (left.HasColour && right.HasColour)
            Compare(0, left.Chromaticity.DistanceUvTo(right.Chromaticity));
        return largest;
    }

    private static Tristimulus ColourOf(FilmOutput output)
    {
        var colour = Of(output.Unconverted);
        foreach (var lot in output.ConvertedByLot)
            colour += Of(lot);
        return colour;

        static Tristimulus Of(Spectrum<PhotonPerNm> light) => new(
            LaneAlgebra.Dot(light.Samples, X.Samples), LaneAlgebra.Dot(light.Samples, Y.Samples), LaneAlgebra.Dot(light.Samples, Z.Samples));
    }

    // Colour-matching functions for photons; the scale does not matter for a chromaticity.
    private static Spectrum<WattPerNm> PerPhoton(ReadOnlySpan<double> bar) =>
        Spectrum.FromSamples<PhotonPerNm>(bar, "CIE 1931").ToPower().ScaledBy(1 / PhysicalConstants.PhotonEnergyJoule(555));
}
