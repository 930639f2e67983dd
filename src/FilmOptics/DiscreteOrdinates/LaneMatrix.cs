using System.Runtime.InteropServices;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>A matrix of lanes in rows, or a block of a larger one.</summary>
internal readonly ref struct LaneMatrix<T>
    where T : struct, ILanes<T>
{
    private readonly Span<T> _data;

    public LaneMatrix(Span<T> data, int rows, int columns, int stride)
    {
        _data = data;
        (Rows, Columns, Stride) = (rows, columns, stride);
    }

    public int Rows { get; }

    public int Columns { get; }

    /// <summary>Distance from a row to the next.</summary>
    public int Stride { get; }

    public ref T this[int row, int column] => ref _data[(row * Stride) + column];

    /// <summary>The first element, for the kernels that walk without checks.</summary>
    public ref T First => ref MemoryMarshal.GetReference(_data);

    /// <summary>A block that shares the storage.</summary>
    public LaneMatrix<T> Block(int row, int column, int rows, int columns) => rows == 0 || columns == 0
        ? new([], rows, columns, Stride)
        : new(_data.Slice((row * Stride) + column, ((rows - 1) * Stride) + columns), rows, columns, Stride);

    /// <summary>A row.</summary>
    public ReadOnlySpan<T> Row(int row) => _data.Slice(row * Stride, Columns);

    public void Clear()
    {
        for (int row = 0; row < Rows; row++)
            _data.Slice(row * Stride, Columns).Clear();
    }

    public void CopyTo(LaneMatrix<T> other)
    {
        for (int row = 0; row < Rows; row++)
            _data.Slice(row * Stride, Columns).CopyTo(other._data.Slice(row * other.Stride, Columns));
    }

    /// <summary>Writes the upper triangle into the lower one.</summary>
    public void MirrorUpper()
    {
        for (int row = 1; row < Rows; row++)
        {
            for (int column = 0; column < row; column++)
                this[row, column] = this[column, row];
        }
    }
}
