namespace FilmReports.Charts;

/// <summary>Lines of equal value on a grid, by marching squares; between grid points values are taken as linear.</summary>
internal static class Contours
{
    /// <summary>Every line of one level, each from end to end; a closed one ends where it began.</summary>
    /// <param name="x">Where the columns stand, rising.</param>
    /// <param name="y">Where the rows stand, rising.</param>
    /// <param name="values">Values at [column, row].</param>
    /// <param name="level">The level.</param>
    public static IReadOnlyList<IReadOnlyList<(double X, double Y)>> Of(IReadOnlyList<double> x, IReadOnlyList<double> y, double[,] values, double level)
    {
        // A crossing lies on an edge of the grid: (column, row, whether the edge goes up). Each cell joins crossings in pairs.
        var neighbours = new Dictionary<(int Column, int Row, bool IsUp), List<(int Column, int Row, bool IsUp)>>();
        for (int i = 0; i + 1 < x.Count; i++)
        {
            for (int j = 0; j + 1 < y.Count; j++)
                JoinCell(i, j);
        }

        var lines = new List<IReadOnlyList<(double X, double Y)>>();
        // Open lines from their ends first; what is left is closed.
        foreach (var start in neighbours.Keys.Where(edge => neighbours[edge].Count == 1).Concat(neighbours.Keys).ToList())
        {
            if (neighbours[start].Count > 0)
                lines.Add(Follow(start));
        }

        return lines;

        bool Above(int i, int j) => values[i, j] >= level;

        void JoinCell(int i, int j)
        {
            var crossed = new List<(int, int, bool)>();
            if (Above(i, j) != Above(i + 1, j))
                crossed.Add((i, j, false));
            if (Above(i + 1, j) != Above(i + 1, j + 1))
                crossed.Add((i + 1, j, true));
            if (Above(i, j + 1) != Above(i + 1, j + 1))
                crossed.Add((i, j + 1, false));
            if (Above(i, j) != Above(i, j + 1))
                crossed.Add((i, j, true));
            if (crossed.Count == 2)
            {
                Join(crossed[0], crossed[1]);
            }
            else if (crossed.Count == 4)
            {
                // A saddle: its middle says which corners belong together.
                bool middle = (values[i, j] + values[i + 1, j] + values[i, j + 1] + values[i + 1, j + 1]) / 4 >= level;
                bool cutsLowerLeft = middle != Above(i, j);
                Join(crossed[0], crossed[cutsLowerLeft ? 3 : 1]);
                Join(crossed[2], crossed[cutsLowerLeft ? 1 : 3]);
            }
        }

        void Join((int, int, bool) a, (int, int, bool) b)
        {
            Of(a).Add(b);
            Of(b).Add(a);

            List<(int, int, bool)> Of((int, int, bool) edge)
            {
                if (!neighbours.TryGetValue(edge, out var list))
                    neighbours.Add(edge, list = []);
                return list;
            }
        }

        List<(double X, double Y)> Follow((int Column, int Row, bool IsUp) start)
        {
            var line = new List<(double X, double Y)> { Crossing(start) };
            var at = start;
            while (neighbours[at].Count > 0)
            {
                var next = neighbours[at][0];
                neighbours[at].RemoveAt(0);
                neighbours[next].Remove(at);
                line.Add(Crossing(next));
                at = next;
            }

            return line;
        }

        (double X, double Y) Crossing((int Column, int Row, bool IsUp) edge)
        {
            var (i, j, isUp) = edge;
            double from = values[i, j], to = isUp ? values[i, j + 1] : values[i + 1, j], share = (level - from) / (to - from);
            return isUp ? (x[i], y[j] + (share * (y[j + 1] - y[j]))) : (x[i] + (share * (x[i + 1] - x[i])), y[j]);
        }
    }
}
