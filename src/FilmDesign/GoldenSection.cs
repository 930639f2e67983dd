namespace FilmDesign;

/// <summary>Least value of a function with one minimum in an interval, ends included.</summary>
/// <remarks>Written out, since the library's refuses an interval whose minimum lies at one of its ends, as it often does here.</remarks>
internal static class GoldenSection
{
    private const double Ratio = 0.6180339887498949;

    /// <summary>Where the function is least.</summary>
    /// <param name="function">Any function; asked once per step.</param>
    /// <param name="from">Lower end.</param>
    /// <param name="to">Upper end.</param>
    /// <param name="tolerance">Width of the interval that counts as found.</param>
    public static double Minimum(Func<double, double> function, double from, double to, double tolerance)
    {
        double left = to - (Ratio * (to - from)), right = from + (Ratio * (to - from));
        double atLeft = function(left), atRight = function(right);
        while (to - from > tolerance)
        {
            if (atLeft < atRight)
            {
                (to, right, atRight) = (right, left, atLeft);
                left = to - (Ratio * (to - from));
                atLeft = function(left);
            }
            else
            {
                (from, left, atLeft) = (left, right, atRight);
                right = from + (Ratio * (to - from));
                atRight = function(right);
            }
        }

        return atLeft < atRight ? left : right;
    }
}
