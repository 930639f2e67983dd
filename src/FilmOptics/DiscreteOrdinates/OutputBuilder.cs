using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Turns what the lots emit into spectra and a budget.</summary>
internal sealed class OutputBuilder(Film film, FilmKernels kernels, FilmLights lights, StateWeights weights, Reemission reemission)
{
    private readonly FilmPlan _plan = kernels.Plan;
    private readonly double[] _byState = new double[kernels.States];

    /// <summary>The film's output.</summary>
    public FilmOutput Build(string model)
    {
        var (lost, total, first) = (new double[film.Lots.Count], new double[film.Lots.Count], new double[film.Lots.Count]);
        for (int e = 0; e < lights.Emitters.Length; e++)
        {
            var emitter = lights.Emitters[e];
            double here = reemission.TotalIn(e);
            total[emitter.Lot] += here;
            lost[emitter.Lot] += (1 - emitter.YieldShare) * here;
            first[emitter.Lot] += reemission.FirstIn(e);
        }

        double host = reemission.InEnd(4);
        for (int layer = 0; layer < _plan.Layers.Count; layer++)
            host += reemission.InHost(layer);
        int above = _plan.CellCount;
        var unconverted = LightIn(0, above, "source");
        var converted = new Spectrum<PhotonPerNm>[film.Lots.Count];
        double convertedSum = 0;
        for (int lot = 0; lot < converted.Length; lot++)
        {
            int used = Array.IndexOf(lights.UsedLots, lot);
            converted[lot] = used < 0
                ? Spectrum.Flat<PhotonPerNm>(0, $"{film.Lots[lot].Name}, not in the film")
                : LightIn(1 + used, above, film.Lots[lot].Name);
            convertedSum += converted[lot].Integral;
        }

        var angles = _plan.ViewBeam >= 0 ? Angles() : null;
        return new()
        {
            Model = model,
            Angles = angles,
            NormalRadiance = _plan.SourceBeam >= 0 ? null : angles?.Radiance[0],
            Unconverted = unconverted,
            ConvertedByLot = converted,
            Budget = new()
            {
                Unconverted = unconverted.Integral,
                Converted = convertedSum,
                LostBelow = reemission.InEnd(1),
                LostAbove = reemission.InEnd(2),
                LostInHost = host,
                LostAtEdges = reemission.InEnd(3),
                LostInLots = lost,
                SourceAbsorbedBy = first,
                Excitations = total,
            },
        };
    }

    private AngularOutput Angles()
    {
        double[] anglesDeg = [.. Enumerable.Range(0, 17).Select(i => 5.0 * i)];
        return new(anglesDeg, [.. anglesDeg.Select(angleDeg =>
        {
            double[] directions = _plan.RadianceWeights(angleDeg);
            var samples = new double[WavelengthGrid.Count];
            for (int line = 0; line < lights.Lines.Length; line++)
            {
                Array.Clear(_byState);
                for (int j = 0; j < directions.Length; j++)
                    AddRow(line, _plan.CellCount + FilmPlan.Ends + j, directions[j]);
                AddLight(samples, line);
            }

            return Spectrum.FromSamples<PhotonPerNm>(samples, FormattableString.Invariant($"radiance at {angleDeg} degrees"));
        })]);
    }

    private Spectrum<PhotonPerNm> LightIn(int line, int row, string name)
    {
        var samples = new double[WavelengthGrid.Count];
        Array.Clear(_byState);
        AddRow(line, row, 1);
        AddLight(samples, line);
        return Spectrum.FromSamples<PhotonPerNm>(samples, $"{name}, discrete ordinates");
    }

    // What of a line's photon arrives in a row, at each state.
    private void AddRow(int line, int row, double factor)
    {
        int first = row * _plan.Inputs;
        for (int state = 0; state < _byState.Length; state++)
        {
            var answers = kernels.Of(state).Slice(first, _plan.Inputs);
            double sum = line == 0 ? answers[0] : LaneAlgebra.Dot(reemission.Emitted[line - 1], answers[1..]);
            _byState[state] += factor * sum;
        }
    }

    private void AddLight(double[] samples, int line)
    {
        var light = lights.Lines[line];
        for (int bin = light.First; bin < light.End; bin++)
            samples[lights.Bins[bin]] += light.Photons[bin] * weights.At(bin, _byState);
    }
}
