namespace Colorimetry;

/// <summary>A curve through the rows of a table.</summary>
/// <param name="nm">Rising wavelengths, at least two.</param>
/// <param name="values">One value each.</param>
internal abstract class Curve(double[] nm, double[] values)
{
    // Nodes of the two-point Gauss rule, exact up to degree 3: for straight lines and cubics.
    private static readonly double GaussNode = Math.Sqrt(1.0 / 3);

    protected double[] Nm { get; } = nm;

    protected double[] Values { get; } = values;

    /// <summary>Which kind it is.</summary>
    public abstract Interpolation Kind { get; }

    /// <summary>The value at a wavelength within the rows.</summary>
    public double At(double wavelengthNm) => InInterval(IntervalOf(wavelengthNm), wavelengthNm);

    /// <summary>Area below the curve between two wavelengths within the rows.</summary>
    public double Area(double fromNm, double toNm)
    {
        double area = 0;
        for (int i = IntervalOf(fromNm); fromNm < toNm; i++)
        {
            double end = i < Nm.Length - 2 ? Math.Min(Nm[i + 1], toNm) : toNm;
            double middle = (fromNm + end) / 2, half = (end - fromNm) / 2;
            area += half * (InInterval(i, middle - (half * GaussNode)) + InInterval(i, middle + (half * GaussNode)));
            fromNm = end;
        }

        return area;
    }

    /// <summary>The value in an interval, which begins at the row of the same index.</summary>
    protected abstract double InInterval(int interval, double wavelengthNm);

    private int IntervalOf(double wavelengthNm)
    {
        int found = Array.BinarySearch(Nm, wavelengthNm);
        return Math.Clamp(found >= 0 ? found : ~found - 1, 0, Nm.Length - 2);
    }
}

/// <summary>Straight lines between rows.</summary>
internal sealed class LinearCurve(double[] nm, double[] values) : Curve(nm, values)
{
    public override Interpolation Kind => Interpolation.Linear;

    protected override double InInterval(int interval, double wavelengthNm)
    {
        double share = (wavelengthNm - Nm[interval]) / (Nm[interval + 1] - Nm[interval]);
        return Values[interval] + (share * (Values[interval + 1] - Values[interval]));
    }
}

/// <summary>A cubic Hermite curve that is monotone wherever its rows are.</summary>
/// <remarks>
/// Source: F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300–304: a slope is the weighted harmonic mean of the
/// secants beside it, 0 at a turn; at the ends a three-point slope that is kept from overshooting.
/// </remarks>
internal sealed class MonotoneCurve : Curve
{
    private readonly double[] _slopes;

    public MonotoneCurve(double[] nm, double[] values)
        : base(nm, values)
    {
        int last = nm.Length - 1;
        var step = new double[last];
        var secant = new double[last];
        for (int i = 0; i < last; i++)
        {
            step[i] = nm[i + 1] - nm[i];
            secant[i] = (values[i + 1] - values[i]) / step[i];
        }

        _slopes = new double[nm.Length];
        if (last == 1)
        {
            _slopes[0] = _slopes[1] = secant[0];
            return;
        }

        for (int i = 1; i < last; i++)
        {
            if (secant[i - 1] * secant[i] <= 0)
                continue;
            double before = (2 * step[i]) + step[i - 1], after = step[i] + (2 * step[i - 1]);
            _slopes[i] = (before + after) / ((before / secant[i - 1]) + (after / secant[i]));
        }

        _slopes[0] = EndSlope(step[0], step[1], secant[0], secant[1]);
        _slopes[last] = EndSlope(step[last - 1], step[last - 2], secant[last - 1], secant[last - 2]);
    }

    public override Interpolation Kind => Interpolation.Monotone;

    protected override double InInterval(int interval, double wavelengthNm)
    {
        double step = Nm[interval + 1] - Nm[interval], x = wavelengthNm - Nm[interval];
        double secant = (Values[interval + 1] - Values[interval]) / step;
        double m0 = _slopes[interval], m1 = _slopes[interval + 1];
        double c = ((3 * secant) - (2 * m0) - m1) / step, d = (m0 + m1 - (2 * secant)) / (step * step);
        double value = Values[interval] + (x * (m0 + (x * (c + (x * d)))));
        // Rounding may step a hair over the rows, which the curve itself never does.
        return Math.Clamp(value, Math.Min(Values[interval], Values[interval + 1]), Math.Max(Values[interval], Values[interval + 1]));
    }

    private static double EndSlope(double step, double nextStep, double secant, double nextSecant)
    {
        double slope = ((((2 * step) + nextStep) * secant) - (step * nextSecant)) / (step + nextStep);
        if (slope * secant <= 0)
            return 0;
        return secant * nextSecant <= 0 && Math.Abs(slope) > 3 * Math.Abs(secant) ? 3 * secant : slope;
    }
}

/// <summary>Sprague's curve, replaced by the monotone one in each interval where it would leave the values allowed.</summary>
internal sealed class SpragueCurve : Curve
{
    private const int ChecksPerInterval = 32;

    private readonly double[] _extended;
    private readonly bool[] _replaced;
    private readonly MonotoneCurve _monotone;

    public SpragueCurve(double[] nm, double[] values, SpectralQuantity quantity)
        : base(nm, values)
    {
        _extended = Sprague.Extend(values);
        _monotone = new(nm, values);
        _replaced = new bool[nm.Length - 1];
        for (int i = 0; i < _replaced.Length; i++)
        {
            for (int k = 1; k < ChecksPerInterval && !_replaced[i]; k++)
            {
                double value = Sprague.At(_extended, i, (double)k / ChecksPerInterval);
                _replaced[i] = value < quantity.LowestValue || value > quantity.HighestValue;
            }
        }
    }

    public override Interpolation Kind => Interpolation.Sprague;

    /// <summary>Number of intervals where the monotone curve stands in.</summary>
    public int ReplacedIntervals => _replaced.Count(r => r);

    protected override double InInterval(int interval, double wavelengthNm) => _replaced[interval]
        ? _monotone.At(wavelengthNm)
        : Sprague.At(_extended, interval, (wavelengthNm - Nm[interval]) / (Nm[interval + 1] - Nm[interval]));
}
