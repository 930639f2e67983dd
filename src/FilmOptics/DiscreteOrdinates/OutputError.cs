using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>How far two outputs of one film lie apart: the largest difference of any budget line and of u′v′ of the light above.</summary>
internal static class OutputError
{
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

        var (left, right) = (Tristimulus.Of(one.Total.ToPower(), StandardObserver.Cie1931), Tristimulus.Of(other.Total.ToPower(), StandardObserver.Cie1931));
        if (left.HasColour && right.HasColour)
            Compare(0, left.Chromaticity.DistanceUvTo(right.Chromaticity));
        return largest;
    }
}
