namespace FilmOptics.DiscreteOrdinates;

/// <summary>All generations of re-emission at once: J = J⁰ + K Φ J over lots and cells, then where every photon ends.</summary>
internal sealed class Reemission
{
    private readonly FilmPlan _plan;
    private readonly FilmSpectra _spectra;
    private readonly StateWeights _weights;
    private readonly double[] _answers;
    private readonly int[] _firstUnknown;
    private readonly int _unknowns;

    public Reemission(FilmPlan plan, FilmSpectra spectra, StateWeights weights, double[] answers)
    {
        (_plan, _spectra, _weights, _answers) = (plan, spectra, weights, answers);
        _firstUnknown = new int[spectra.Emitters.Length];
        for (int e = 0; e < _firstUnknown.Length; e++)
        {
            _firstUnknown[e] = _unknowns;
            _unknowns += plan.Cells[spectra.Emitters[e].Layer];
        }
    }

    /// <summary>Excitations of each emitter in each cell, per source photon, extrapolated over the cells.</summary>
    /// <param name="coarser">The same from half and a quarter of the cells, to judge the error by.</param>
    public double[] Excitations(out double[] coarser)
    {
        var (direct, kernel) = Kernel();
        double[] fine = Solve(direct, kernel, 1);
        double[] half = Solve(direct, kernel, 2);
        double[] quarter = Solve(direct, kernel, 4);
        coarser = Extrapolate(half, quarter);
        return Extrapolate(fine, half);
    }

    /// <summary>Photons in a row of the answers, for emission as given, at each state.</summary>
    /// <param name="row">Which row.</param>
    /// <param name="emitted">Photons emitted in each cell.</param>
    public double[] RowOf(int row, ReadOnlySpan<double> emitted)
    {
        var values = new double[_weights.States];
        int size = _plan.Rows * _plan.Inputs;
        for (int state = 0; state < values.Length; state++)
        {
            var answers = _answers.AsSpan((state * size) + (row * _plan.Inputs) + 1, emitted.Length);
            double sum = 0;
            for (int cell = 0; cell < emitted.Length; cell++)
                sum += emitted[cell] * answers[cell];
            values[state] = sum;
        }

        return values;
    }

    /// <summary>Source photons in a row of the answers, at each state.</summary>
    public double[] SourceRow(int row)
    {
        var values = new double[_weights.States];
        int size = _plan.Rows * _plan.Inputs;
        for (int state = 0; state < values.Length; state++)
            values[state] = _answers[(state * size) + (row * _plan.Inputs)];
        return values;
    }

    /// <summary>Photons that a used lot emits in each cell.</summary>
    public double[] Emitted(int usedLot, ReadOnlySpan<double> excitations)
    {
        var emitted = new double[_plan.CellCount];
        for (int e = 0; e < _spectra.Emitters.Length; e++)
        {
            var emitter = _spectra.Emitters[e];
            if (emitter.UsedLot != usedLot)
                continue;
            for (int cell = 0; cell < _plan.Cells[emitter.Layer]; cell++)
                emitted[_plan.FirstCell[emitter.Layer] + cell] += emitter.YieldShare * excitations[_firstUnknown[e] + cell];
        }

        return emitted;
    }

    /// <summary>Excitations of an emitter in all its cells.</summary>
    public double TotalOf(int emitter, ReadOnlySpan<double> excitations)
    {
        double sum = 0;
        foreach (double cell in excitations.Slice(_firstUnknown[emitter], _plan.Cells[_spectra.Emitters[emitter].Layer]))
            sum += cell;
        return sum;
    }

    /// <summary>Light × a share, by bin, brought to the states.</summary>
    public double[] Gather(double[] light, double[] share)
    {
        var product = new double[light.Length];
        for (int i = 0; i < product.Length; i++)
            product[i] = light[i] * share[i];
        return _weights.Gather(product);
    }

    private (double[] Direct, double[] Kernel) Kernel()
    {
        var direct = new double[_unknowns];
        var kernel = new double[_unknowns * _unknowns];
        int size = _plan.Rows * _plan.Inputs, inputs = _plan.Inputs;
        for (int e = 0; e < _spectra.Emitters.Length; e++)
        {
            var absorber = _spectra.Emitters[e];
            int cells = _plan.Cells[absorber.Layer], firstRow = _plan.FirstCell[absorber.Layer];
            double[] source = Gather(_spectra.Source, _spectra.DotShare[e]);
            for (int state = 0; state < source.Length; state++)
            {
                for (int cell = 0; cell < cells; cell++)
                    direct[_firstUnknown[e] + cell] += source[state] * _answers[(state * size) + ((firstRow + cell) * inputs)];
            }

            for (int lot = 0; lot < _spectra.UsedLots.Length; lot++)
            {
                double[] weight = Gather(_spectra.Emission[lot], _spectra.DotShare[e]);
                for (int f = 0; f < _spectra.Emitters.Length; f++)
                {
                    var emitter = _spectra.Emitters[f];
                    if (emitter.UsedLot != lot)
                        continue;
                    int emitterCells = _plan.Cells[emitter.Layer], firstInput = 1 + _plan.FirstCell[emitter.Layer];
                    for (int state = 0; state < weight.Length; state++)
                    {
                        double share = weight[state] * emitter.YieldShare;
                        if (share == 0)
                            continue;
                        for (int cell = 0; cell < cells; cell++)
                        {
                            var from = _answers.AsSpan((state * size) + ((firstRow + cell) * inputs) + firstInput, emitterCells);
                            var to = kernel.AsSpan(((_firstUnknown[e] + cell) * _unknowns) + _firstUnknown[f], emitterCells);
                            for (int other = 0; other < from.Length; other++)
                                to[other] += share * from[other];
                        }
                    }
                }
            }
        }

        return (direct, kernel);
    }

    // With cells joined in groups, evenly filled; the answer is spread over the single cells again.
    private double[] Solve(double[] direct, double[] kernel, int group)
    {
        int n = _unknowns / group;
        var (matrix, right) = (new double[n * n], new double[n]);
        for (int row = 0; row < _unknowns; row++)
        {
            right[row / group] += direct[row];
            for (int column = 0; column < _unknowns; column++)
                matrix[(row / group * n) + (column / group)] -= kernel[(row * _unknowns) + column] / group;
        }

        for (int i = 0; i < n; i++)
            matrix[(i * n) + i] += 1;
        DenseSolver.Solve(matrix, right);
        var spread = new double[_unknowns];
        for (int i = 0; i < _unknowns; i++)
            spread[i] = right[i / group] / group;
        return spread;
    }

    // The error of even filling falls with the square of the cell.
    private static double[] Extrapolate(double[] fine, double[] coarse)
    {
        var better = new double[fine.Length];
        for (int i = 0; i < fine.Length; i++)
            better[i] = ((4 * fine[i]) - coarse[i]) / 3;
        return better;
    }
}
