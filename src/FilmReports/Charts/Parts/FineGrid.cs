namespace FilmReports.Charts;

/// <summary>More points between those of an even grid, by cubic interpolation through them (Catmull–Rom), for smooth pictures.</summary>
internal static class FineGrid
{
    /// <summary>The axis of the finer grid.</summary>
    /// <param name="axis">Even steps.</param>
    /// <param name="finer">New steps in an old one.</param>
    public static IEnumerable<double> Axis(IReadOnlyList<double> axis, int finer) =>
        Enumerable.Range(0, ((axis.Count - 1) * finer) + 1).Select(i => axis[0] + ((axis[^1] - axis[0]) * i / ((axis.Count - 1) * finer)));

    /// <summary>The values on the finer grid; those of the old points stay.</summary>
    /// <param name="values">Values at [column, row].</param>
    /// <param name="finer">New steps in an old one.</param>
    public static double[,] Refined(double[,] values, int finer)
    {
        int columns = values.GetLength(0), rows = values.GetLength(1), fineColumns = ((columns - 1) * finer) + 1, fineRows = ((rows - 1) * finer) + 1;
        var across = new double[fineColumns, rows];
        for (int i = 0; i < fineColumns; i++)
        {
            for (int j = 0; j < rows; j++)
                across[i, j] = Between(k => values[k, j], columns, i, finer);
        }

        var refined = new double[fineColumns, fineRows];
        for (int i = 0; i < fineColumns; i++)
        {
            for (int j = 0; j < fineRows; j++)
                refined[i, j] = Between(k => across[i, k], rows, j, finer);
        }

        return refined;
    }

    private static double Between(Func<int, double> value, int count, int fine, int finer)
    {
        int at = Math.Min(fine / finer, count - 2);
        double t = (fine - (at * finer)) / (double)finer, p1 = value(at), p2 = value(at + 1);
        // Beyond the ends the line goes on straight.
        double p0 = at > 0 ? value(at - 1) : (2 * p1) - p2, p3 = at + 2 < count ? value(at + 2) : (2 * p2) - p1;
        return p1 + (0.5 * t * (p2 - p0 + (t * ((2 * p0) - (5 * p1) + (4 * p2) - p3 + (t * ((3 * (p1 - p2)) + p3 - p0))))));
    }
}
