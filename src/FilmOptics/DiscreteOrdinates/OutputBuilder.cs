using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Turns excitations into spectra and a budget.</summary>
internal sealed class OutputBuilder(Film film, FilmPlan plan, FilmSpectra spectra, StateWeights weights, Reemission reemission)
{
    private readonly int _above = plan.CellCount;

    /// <summary>The film's output for the excitations of each emitter in each cell.</summary>
    public FilmOutput Build(double[] excitations, string model)
    {
        var emitted = new double[spectra.UsedLots.Length][];
        for (int lot = 0; lot < emitted.Length; lot++)
            emitted[lot] = reemission.Emitted(lot, excitations);

        double[] source = weights.Gather(spectra.Source);
        double[][] emission = [.. spectra.Emission.Select(light => weights.Gather(light))];
        double Row(int row)
        {
            double sum = Dot(source, reemission.SourceRow(row));
            for (int lot = 0; lot < emitted.Length; lot++)
                sum += Dot(emission[lot], reemission.RowOf(row, emitted[lot]));
            return sum;
        }

        double host = 0;
        for (int layer = 0; layer < spectra.Layers.Count; layer++)
        {
            double[] fromSource = reemission.Gather(spectra.Source, spectra.HostShare[layer]);
            double[][] fromLots = [.. spectra.Emission.Select(light => reemission.Gather(light, spectra.HostShare[layer]))];
            for (int cell = plan.FirstCell[layer]; cell < plan.FirstCell[layer] + plan.Cells[layer]; cell++)
            {
                host += Dot(fromSource, reemission.SourceRow(cell));
                for (int lot = 0; lot < emitted.Length; lot++)
                    host += Dot(fromLots[lot], reemission.RowOf(cell, emitted[lot]));
            }
        }

        var (lost, total, first) = (new double[film.Lots.Count], new double[film.Lots.Count], new double[film.Lots.Count]);
        for (int e = 0; e < spectra.Emitters.Length; e++)
        {
            var emitter = spectra.Emitters[e];
            double here = reemission.TotalOf(e, excitations);
            total[emitter.Lot] += here;
            lost[emitter.Lot] += (1 - emitter.YieldShare) * here;
            double[] fromSource = reemission.Gather(spectra.Source, spectra.DotShare[e]);
            for (int cell = 0; cell < plan.Cells[emitter.Layer]; cell++)
                first[emitter.Lot] += Dot(fromSource, reemission.SourceRow(plan.FirstCell[emitter.Layer] + cell));
        }

        var unconverted = Spread(spectra.Source, reemission.SourceRow(_above), "source");
        Spectrum<PhotonPerNm>[] converted = [.. film.Lots.Select((lot, position) =>
        {
            int used = Array.IndexOf(spectra.UsedLots, position);
            return used < 0
                ? Spectrum.Flat<PhotonPerNm>(0, $"{lot.Name}, not in the film")
                : Spread(spectra.Emission[used], reemission.RowOf(_above, emitted[used]), lot.Name);
        })];
        var angles = plan.ViewBeam >= 0 ? Angles(emitted) : null;
        return new()
        {
            Model = model,
            Angles = angles,
            NormalRadiance = plan.SourceBeam >= 0 ? null : angles?.Radiance[0],
            Unconverted = unconverted,
            ConvertedByLot = converted,
            Budget = new()
            {
                Unconverted = unconverted.Integral,
                Converted = converted.Sum(light => light.Integral),
                LostBelow = Row(_above + 1),
                LostAbove = Row(_above + 2),
                LostInHost = host,
                LostAtEdges = Row(_above + 3),
                LostInLots = lost,
                SourceAbsorbedBy = first,
                Excitations = total,
            },
        };
    }

    private AngularOutput Angles(double[][] emitted)
    {
        // Amplitudes in each direction of the air above, from the source and from each lot, at each state.
        double[][] source = [.. Enumerable.Range(0, plan.AirCount).Select(j => reemission.SourceRow(plan.CellCount + 4 + j))];
        double[][][] lots = [.. emitted.Select(cells => Enumerable.Range(0, plan.AirCount)
            .Select(j => reemission.RowOf(plan.CellCount + 4 + j, cells)).ToArray())];
        double[] anglesDeg = [.. Enumerable.Range(0, 17).Select(i => 5.0 * i)];
        return new(anglesDeg, [.. anglesDeg.Select(angleDeg =>
        {
            double[] directions = plan.RadianceWeights(angleDeg);
            var samples = new double[WavelengthGrid.Count];
            Add(samples, spectra.Source, Combine(source, directions));
            for (int lot = 0; lot < lots.Length; lot++)
                Add(samples, spectra.Emission[lot], Combine(lots[lot], directions));
            return Spectrum.FromSamples<PhotonPerNm>(samples, FormattableString.Invariant($"radiance at {angleDeg} degrees"));
        })]);
    }

    private void Add(double[] samples, double[] light, double[] shareByState)
    {
        for (int i = 0; i < light.Length; i++)
        {
            if (light[i] > 0)
                samples[spectra.Bins[i]] += light[i] * weights.At(i, shareByState);
        }
    }

    private static double[] Combine(double[][] rows, double[] factors)
    {
        var sum = new double[rows[0].Length];
        for (int row = 0; row < rows.Length; row++)
        {
            for (int i = 0; i < sum.Length; i++)
                sum[i] += factors[row] * rows[row][i];
        }

        return sum;
    }

    private Spectrum<PhotonPerNm> Spread(double[] light, double[] shareByState, string name)
    {
        var samples = new double[WavelengthGrid.Count];
        Add(samples, light, shareByState);
        return Spectrum.FromSamples<PhotonPerNm>(samples, $"{name}, discrete ordinates");
    }

    private static double Dot(double[] one, double[] other)
    {
        double sum = 0;
        for (int i = 0; i < one.Length; i++)
            sum += one[i] * other[i];
        return sum;
    }
}
