using System.Globalization;

namespace Colorimetry.Tests;

/// <summary>The same figures from a second colour library; its name and version stand in the file's first line.</summary>
public sealed class SecondLibraryTests
{
    private const double LastDigits = 2e-5;
    private static readonly Tristimulus White = Tristimulus.From(new(0.3127, 0.3290), 1);

    public static TheoryData<string, string, string> Rows()
    {
        var rows = new TheoryData<string, string, string>();
        foreach (string[] row in DataRows.Read("second-library.csv"))
            rows.Add(row[0], row[1], row[2]);
        return rows;
    }

    [Theory]
    [MemberData(nameof(Rows))]
    public void Figure_AgreesWithTheSecondLibrary(string check, string arguments, string expected)
    {
        double[] a = Numbers(arguments), wanted = Numbers(expected);
        double[] computed = check switch
        {
            "lab" => [.. Parts(Cielab.From(new(a[0], a[1], a[2]), White))],
            "luv" => [.. Parts(Cieluv.From(new(a[0], a[1], a[2]), White))],
            _ => [ColourDifference.De2000(new(a[0], a[1], a[2]), new(a[3], a[4], a[5]))],
        };
        for (int i = 0; i < wanted.Length; i++)
            Published.AssertWithin(wanted[i], computed[i], LastDigits, $"{check} {arguments}, part {i}");
    }

    private static double[] Parts(Cielab c) => [c.L, c.A, c.B];

    private static double[] Parts(Cieluv c) => [c.L, c.U, c.V];

    private static double[] Numbers(string text) => [.. text.Split(';').Select(n => double.Parse(n, CultureInfo.InvariantCulture))];
}
