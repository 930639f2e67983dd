using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Numbers of several optical states worked on at once. The same code runs on one lane or on eight.</summary>
internal interface ILanes<TSelf> :
    IAdditionOperators<TSelf, TSelf, TSelf>,
    ISubtractionOperators<TSelf, TSelf, TSelf>,
    IMultiplyOperators<TSelf, TSelf, TSelf>,
    IDivisionOperators<TSelf, TSelf, TSelf>,
    IUnaryNegationOperators<TSelf, TSelf>
    where TSelf : struct, ILanes<TSelf>
{
    /// <summary>Lanes.</summary>
    static abstract int Count { get; }

    /// <summary>The same number in every lane.</summary>
    static abstract TSelf All(double value);

    /// <summary>The first <see cref="Count"/> numbers.</summary>
    static abstract TSelf Load(ReadOnlySpan<double> values);

    /// <summary>left × right + addend, in whichever rounding the machine is quick at.</summary>
    static abstract TSelf MultiplyAdd(TSelf left, TSelf right, TSelf addend);

    /// <summary>Square root.</summary>
    static abstract TSelf Root(TSelf value);

    /// <summary>Number in a lane.</summary>
    double this[int lane] { get; }
}

/// <summary>Eight states in one 512-bit register, or in what the machine has instead.</summary>
[StructLayout(LayoutKind.Sequential)]
internal readonly struct WideLanes(Vector512<double> value) : ILanes<WideLanes>
{
    private readonly Vector512<double> _value = value;

    public static int Count => 8;

    public double this[int lane] => _value.GetElement(lane);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes operator +(WideLanes left, WideLanes right) => new(left._value + right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes operator -(WideLanes left, WideLanes right) => new(left._value - right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes operator *(WideLanes left, WideLanes right) => new(left._value * right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes operator /(WideLanes left, WideLanes right) => new(left._value / right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes operator -(WideLanes value) => new(-value._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes All(double value) => new(Vector512.Create(value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes Load(ReadOnlySpan<double> values) => new(Vector512.Create(values));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes MultiplyAdd(WideLanes left, WideLanes right, WideLanes addend) =>
        new(Vector512.MultiplyAddEstimate(left._value, right._value, addend._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static WideLanes Root(WideLanes value) => new(Vector512.Sqrt(value._value));
}

/// <summary>One state at a time: the plain reading of the algebra, and the check on the wide one.</summary>
internal readonly struct SingleLane(double value) : ILanes<SingleLane>
{
    private readonly double _value = value;

    public static int Count => 1;

    public double this[int lane] => _value;

    public static SingleLane operator +(SingleLane left, SingleLane right) => new(left._value + right._value);

    public static SingleLane operator -(SingleLane left, SingleLane right) => new(left._value - right._value);

    public static SingleLane operator *(SingleLane left, SingleLane right) => new(left._value * right._value);

    public static SingleLane operator /(SingleLane left, SingleLane right) => new(left._value / right._value);

    public static SingleLane operator -(SingleLane value) => new(-value._value);

    public static SingleLane All(double value) => new(value);

    public static SingleLane Load(ReadOnlySpan<double> values) => new(values[0]);

    public static SingleLane MultiplyAdd(SingleLane left, SingleLane right, SingleLane addend) =>
        new((left._value * right._value) + addend._value);

    public static SingleLane Root(SingleLane value) => new(Math.Sqrt(value._value));
}
