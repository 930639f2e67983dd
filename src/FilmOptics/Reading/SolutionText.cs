using System.Globalization;
using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Writes a solved film's loadings into the text of its film file.</summary>
internal sealed class SolutionText(string text, string path, FaultList faults)
{
    private string _text = text;

    /// <summary>The text with overrides, loadings and file names put in; comments and layout stay.</summary>
    public string With(IReadOnlyList<string> overrides, Film solved, string newPath)
    {
        var expected = Tree(_text);
        foreach (string option in overrides)
        {
            if (KeyOverride.Parse(option, faults) is not { } change)
                continue;
            var root = Tree(_text);
            if (KeyPath.Resolve(root, change.Steps, faults) is { } target)
                _text = TextEditor.With(_text, root, change, target);
            change.ApplyTo(expected, faults);
        }

        faults.ThrowIfAny();
        RequireSame(expected);
        var tree = Tree(_text);
        RequireIsOf(solved, tree);
        var changes = new List<(TextSpan, string)>();
        changes.AddRange(Loadings(tree, solved));
        changes.AddRange(FileNames(tree, newPath));
        return TextEditor.With(_text, changes);
    }

    private MappingNode Tree(string edited)
    {
        if (NodeComposer.Compose(edited, new(path, 1, 1), faults) is MappingNode root && !faults.Any)
            return root;
        faults.ThrowIfAny();
        throw new InputException(new InputFault(path, 1, 1, "Keys with values are due."));
    }

    // An odd layout, such as a pair without braces in a list, could make an edit mean something else.
    private void RequireSame(MappingNode expected)
    {
        if (FlowText.Of(Tree(_text), isJson: true) != FlowText.Of(expected, isJson: true))
        {
            throw new InputException(new InputFault(
                path, null, null, "The overrides cannot be written into a file of this layout; write them in by hand and leave --set out."));
        }
    }

    private void RequireIsOf(Film solved, MappingNode root)
    {
        static string? Name(Node node, string key) => ((node as MappingNode)?.Find(key)?.Value as ScalarNode)?.Text;
        var written = Items(root.Find("layers")?.Value).Select(layer =>
            (Name(layer, "name"), string.Join('\n', Items((layer as MappingNode)?.Find("dots")?.Value).Select(dots => Name(dots, "lot")))));
        var given = solved.Layers.Select(layer => ((string?)layer.Name, string.Join('\n', layer.Dots.Select(dots => dots.Lot.Name))));
        if (!written.SequenceEqual(given))
            throw new InputException(new InputFault(path, null, null, "The layers and dots of this text are not those of the solved film."));
    }

    private static IEnumerable<(TextSpan Span, string Value)> Loadings(MappingNode root, Film solved)
    {
        var layers = Items(root.Find("layers")?.Value);
        for (int i = 0; i < layers.Count; i++)
        {
            var node = (MappingNode)layers[i];
            var layer = solved.Layers[i];
            var wtPercents = FilmOptics.Loadings.WtPercents(layer);
            if (node.Find("coat_weight_g_per_m2")?.Value is { } coatWeight)
                yield return Number(coatWeight, FilmOptics.Loadings.CoatWeightGPerM2(layer)!.Value);
            var dots = Items(node.Find("dots")?.Value);
            for (int j = 0; j < dots.Count; j++)
            {
                var entry = (MappingNode)dots[j];
                yield return entry.Find("loading_wt_percent")?.Value is { } byWeight
                    ? Number(byWeight, wtPercents[j]!.Value)
                    : Number(entry.Find("loading_mg_per_ml")!.Value, layer.Dots[j].LoadingMgPerMl);
            }
        }
    }

    // What is the same to the digits written stays as the user wrote it.
    private static (TextSpan Span, string Value) Number(Node node, double value)
    {
        string written = ((ScalarNode)node).Text, rounded = value.ToString("G8", CultureInfo.InvariantCulture);
        bool isSame = double.Parse(written, CultureInfo.InvariantCulture).ToString("G8", CultureInfo.InvariantCulture) == rounded;
        return (node.Span, isSame ? written : rounded);
    }

    private static List<Node> Items(Node? node) => (node as ListNode)?.Items ?? [];

    private List<(TextSpan Span, string Value)> FileNames(MappingNode root, string newPath)
    {
        string oldFolder = Path.GetDirectoryName(Path.GetFullPath(path))!, newFolder = Path.GetDirectoryName(Path.GetFullPath(newPath))!;
        if (oldFolder == newFolder)
            return [];
        var reader = new FilmReader(Path.GetDirectoryName(path) ?? "", new SpectrumShelf(), faults);
        reader.Read(root, "");
        faults.ThrowIfAny();
        return [.. from name in reader.FileNames
                   where !Path.IsPathRooted(name.Text)
                   let moved = Path.GetRelativePath(newFolder, Path.Combine(oldFolder, name.Text)).Replace('\\', '/')
                   select (name.Span, FlowText.Of(new ScalarNode(moved, name.IsPlain, default, default), isJson: false))];
    }
}
