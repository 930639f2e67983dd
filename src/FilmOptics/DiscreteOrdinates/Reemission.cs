namespace FilmOptics.DiscreteOrdinates;

/// <summary>All generations of re-emission at once: J = J⁰ + K Φ J over lots and cells, then where every photon ends.</summary>
internal sealed class Reemission
{
    private readonly FilmPlan _plan;
    private readonly FilmLights _lights;
    private readonly FilmSpectra _spectra;
    private readonly int[] _firstUnknown;
    private readonly int _unknowns;
    private readonly int[] _block;
    private readonly double[][] _sums;
    private readonly double[] _matrix, _fine, _half, _direct, _kernel;
    private readonly double[][] _emitted;

    public Reemission(FilmPlan plan, FilmSpectra spectra)
    {
        (_plan, _spectra, _lights) = (plan, spectra, spectra.Lights);
        _firstUnknown = new int[_lights.Emitters.Length];
        for (int e = 0; e < _firstUnknown.Length; e++)
        {
            _firstUnknown[e] = _unknowns;
            _unknowns += plan.Cells[_lights.Emitters[e].Layer];
        }

        _block = new int[spectra.Channels + 1];
        for (int channel = 0; channel < spectra.Channels; channel++)
            _block[channel + 1] = _block[channel] + (RowsOf(channel).Count * plan.Inputs);
        _sums = [.. _lights.Lines.Select(_ => new double[_block[^1]])];
        (_matrix, _fine, _half) = (new double[_unknowns * _unknowns], new double[_unknowns], new double[_unknowns]);
        (_direct, _kernel) = (new double[_unknowns], new double[_unknowns * _unknowns]);
        _emitted = [.. _lights.UsedLots.Select(_ => new double[plan.CellCount])];
        Excitations = new double[_unknowns];
    }

    /// <summary>Excitations of each emitter in each cell, per source photon, extrapolated over the cells.</summary>
    public double[] Excitations { get; }

    /// <summary>Photons that each used lot emits in each cell.</summary>
    public IReadOnlyList<double[]> Emitted => _emitted;

    /// <summary>Solves for what the lots emit.</summary>
    /// <param name="kernels">The film's answers.</param>
    /// <param name="moments">Its light.</param>
    public void Solve(FilmKernels kernels, LightMoments moments)
    {
        Sum(kernels, moments);
        Couple();
        Solve(_fine, 1);
        Solve(_half, 2);

        // The error of even filling falls with the square of the cell.
        for (int i = 0; i < _unknowns; i++)
            Excitations[i] = ((4 * _fine[i]) - _half[i]) / 3;
        foreach (double[] cells in _emitted)
            Array.Clear(cells);
        for (int e = 0; e < _lights.Emitters.Length; e++)
        {
            var emitter = _lights.Emitters[e];
            for (int cell = 0; cell < _plan.Cells[emitter.Layer]; cell++)
                _emitted[emitter.UsedLot][_plan.FirstCell[emitter.Layer] + cell] += emitter.YieldShare * Excitations[_firstUnknown[e] + cell];
        }
    }

    /// <summary>Photons that end in one of <see cref="FilmPlan.Ends"/>.</summary>
    public double InEnd(int end)
    {
        double sum = _sums[0][end * _plan.Inputs];
        for (int lot = 0; lot < _emitted.Length; lot++)
            sum += LaneAlgebra.Dot(_emitted[lot], _sums[1 + lot].AsSpan((end * _plan.Inputs) + 1));
        return sum;
    }

    /// <summary>Photons that the host of a layer with dots absorbs.</summary>
    public double InHost(int layer)
    {
        int channel = _spectra.ChannelOfHost(layer);
        double sum = 0;
        for (int cell = 0; cell < _plan.Cells[layer]; cell++)
        {
            int at = _block[channel] + (cell * _plan.Inputs);
            sum += _sums[0][at];
            for (int lot = 0; lot < _emitted.Length; lot++)
                sum += LaneAlgebra.Dot(_emitted[lot], _sums[1 + lot].AsSpan(at + 1));
        }

        return sum;
    }

    /// <summary>Source photons that an emitter absorbs.</summary>
    public double FirstIn(int emitter)
    {
        double sum = 0;
        for (int cell = 0; cell < _plan.Cells[_lights.Emitters[emitter].Layer]; cell++)
            sum += _direct[_firstUnknown[emitter] + cell];
        return sum;
    }

    /// <summary>Excitations of an emitter in all its cells.</summary>
    public double TotalIn(int emitter)
    {
        double sum = 0;
        foreach (double cell in Excitations.AsSpan(_firstUnknown[emitter], _plan.Cells[_lights.Emitters[emitter].Layer]))
            sum += cell;
        return sum;
    }

    // Rows of the answers that a channel meets: the ends for all light, the cells of its layer for what is absorbed there.
    private (int First, int Count) RowsOf(int channel)
    {
        if (channel == 0)
            return (_plan.CellCount, FilmPlan.Ends);
        int emitters = _lights.Emitters.Length;
        int layer = channel <= emitters ? _lights.Emitters[channel - 1].Layer : channel - 1 - emitters;
        return (_plan.FirstCell[layer], _plan.Cells[layer]);
    }

    private void Sum(FilmKernels kernels, LightMoments moments)
    {
        for (int line = 0; line < _sums.Length; line++)
        {
            Array.Clear(_sums[line]);
            for (int channel = 0; channel < _spectra.Channels; channel++)
            {
                var (first, count) = RowsOf(channel);
                var target = _sums[line].AsSpan(_block[channel], count * _plan.Inputs);
                for (int state = 0; state < moments.States; state++)
                {
                    double moment = moments.At(line, state, channel);
                    if (moment == 0)
                        continue;
                    var answers = kernels.Of(state).Slice(first * _plan.Inputs, target.Length);
                    if (line > 0)
                    {
                        LaneAlgebra.AddScaled(target, answers, moment);
                        continue;
                    }

                    for (int row = 0; row < target.Length; row += _plan.Inputs)
                        target[row] += moment * answers[row];
                }
            }
        }
    }

    private void Couple()
    {
        for (int e = 0; e < _lights.Emitters.Length; e++)
        {
            int block = _block[FilmSpectra.ChannelOf(e)];
            for (int cell = 0; cell < _plan.Cells[_lights.Emitters[e].Layer]; cell++)
            {
                int row = _firstUnknown[e] + cell, at = block + (cell * _plan.Inputs);
                _direct[row] = _sums[0][at];
                for (int f = 0; f < _lights.Emitters.Length; f++)
                {
                    var emitter = _lights.Emitters[f];
                    var from = _sums[1 + emitter.UsedLot].AsSpan(at + 1 + _plan.FirstCell[emitter.Layer], _plan.Cells[emitter.Layer]);
                    var to = _kernel.AsSpan((row * _unknowns) + _firstUnknown[f], from.Length);
                    for (int other = 0; other < from.Length; other++)
                        to[other] = emitter.YieldShare * from[other];
                }
            }
        }
    }

    // With cells joined in groups, evenly filled; the answer is spread over the single cells again.
    private void Solve(double[] spread, int group)
    {
        int n = _unknowns / group;
        var matrix = _matrix.AsSpan(0, n * n);
        var right = spread.AsSpan(0, n);
        matrix.Clear();
        right.Clear();
        double share = -1.0 / group;
        for (int row = 0; row < _unknowns; row++)
        {
            right[row / group] += _direct[row];
            var target = matrix.Slice(row / group * n, n);
            var from = _kernel.AsSpan(row * _unknowns, _unknowns);
            for (int column = 0; column < from.Length; column++)
                target[column / group] += share * from[column];
        }

        for (int i = 0; i < n; i++)
            matrix[(i * n) + i] += 1;
        DenseSolver.Solve(matrix, right);
        for (int i = _unknowns - 1; i >= 0; i--)
            spread[i] = right[i / group] / group;
    }
}
