using FilmOptics.Reading;

namespace FilmOptics.Tests.Reading;

/// <summary>One override put into a text, checked to mean the same as in the tree.</summary>
internal static class EditedText
{
    public static string With(string text, string option)
    {
        var faults = new FaultList("t");
        var tree = Tree(text, faults);
        var change = KeyOverride.Parse(option, faults)!;
        string edited = TextEditor.With(text, tree, change, KeyPath.Resolve(tree, change.Steps, faults)!);
        change.ApplyTo(tree, faults);
        faults.ThrowIfAny();
        Assert.Equal(FlowText.Of(tree, isJson: true), FlowText.Of(Tree(edited, faults), isJson: true));
        return edited;
    }

    private static MappingNode Tree(string text, FaultList faults) =>
        Assert.IsType<MappingNode>(NodeComposer.Compose(text, new("t", 1, 1), faults));
}
