namespace FilmOptics;

/// <summary>A quantity against the polar angle in air: rows at rising angles, linear between them.</summary>
/// <remarks>Angles lie within 0 to 90 degrees. Beyond the last row the quantity keeps its last value, before the first its first.</remarks>
public sealed class AngleTable
{
    private readonly double[] _anglesDeg;
    private readonly double[] _values;

    /// <summary>A table of at least two rows.</summary>
    /// <param name="anglesDeg">Rising polar angles in air, degrees, 0 to 90.</param>
    /// <param name="values">One finite, non-negative value per angle.</param>
    /// <param name="source">Where the numbers came from.</param>
    /// <exception cref="ArgumentException">Counts differ, angles do not rise or leave 0…90, or a value is negative or not finite.</exception>
    public AngleTable(ReadOnlySpan<double> anglesDeg, ReadOnlySpan<double> values, string source)
    {
        if (anglesDeg.Length != values.Length || anglesDeg.Length < 2)
            throw new ArgumentException($"{source}: {anglesDeg.Length} angles and {values.Length} values; at least two of each are needed.", nameof(values));
        for (int i = 0; i < anglesDeg.Length; i++)
        {
            if (!(anglesDeg[i] is >= 0 and <= 90) || (i > 0 && anglesDeg[i] <= anglesDeg[i - 1]))
                throw new ArgumentException($"{source}: angle {anglesDeg[i]} in row {i + 1}; angles rise within 0 to 90 degrees.", nameof(anglesDeg));
            if (!(values[i] >= 0) || !double.IsFinite(values[i]))
                throw new ArgumentException($"{source}: value {values[i]} at {anglesDeg[i]} degrees; at least 0 is allowed.", nameof(values));
        }

        (_anglesDeg, _values, Source) = (anglesDeg.ToArray(), values.ToArray(), source);
    }

    /// <summary>Where the numbers came from.</summary>
    public string Source { get; }

    /// <summary>Rising polar angles in air, degrees.</summary>
    public ReadOnlySpan<double> AnglesDeg => _anglesDeg;

    /// <summary>Values at those angles.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Mean of the quantity over Lambertian light in air: ∫ q(θ) sin 2θ dθ over 0 to 90 degrees, exact for the straight pieces.</summary>
    public double LambertianMean
    {
        get
        {
            double mean = Piece(0, _anglesDeg[0], _values[0], _values[0]) + Piece(_anglesDeg[^1], 90, _values[^1], _values[^1]);
            for (int i = 1; i < _anglesDeg.Length; i++)
                mean += Piece(_anglesDeg[i - 1], _anglesDeg[i], _values[i - 1], _values[i]);
            return mean;
        }
    }

    /// <summary>The value at a direction, linear in the angle.</summary>
    /// <param name="airCosine">Cosine of the polar angle in air, 0…1.</param>
    public double At(double airCosine)
    {
        double angleDeg = Math.Acos(Math.Clamp(airCosine, 0, 1)) * 180 / Math.PI;
        int upper = Array.BinarySearch(_anglesDeg, angleDeg);
        if (upper >= 0)
            return _values[upper];
        upper = ~upper;
        if (upper == 0)
            return _values[0];
        if (upper == _anglesDeg.Length)
            return _values[^1];
        double share = (angleDeg - _anglesDeg[upper - 1]) / (_anglesDeg[upper] - _anglesDeg[upper - 1]);
        return _values[upper - 1] + (share * (_values[upper] - _values[upper - 1]));
    }

    // ∫ (c + b θ) sin 2θ dθ between two angles.
    private static double Piece(double fromDeg, double toDeg, double fromValue, double toValue)
    {
        if (toDeg <= fromDeg)
            return 0;
        double from = fromDeg * Math.PI / 180, to = toDeg * Math.PI / 180;
        double slope = (toValue - fromValue) / (to - from), offset = fromValue - (slope * from);
        return Primitive(to) - Primitive(from);

        double Primitive(double angle) =>
            (-(offset + (slope * angle)) * Math.Cos(2 * angle) / 2) + (slope * Math.Sin(2 * angle) / 4);
    }
}
