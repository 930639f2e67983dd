namespace FilmOptics.Reading;

/// <summary>A step of a key as --set writes it: a key, or in brackets an item of a list.</summary>
internal sealed record KeyStep(string Text, bool IsItem, Place Place);

/// <summary>Where a key of --set leads in a tree.</summary>
/// <param name="Owner">Mapping or list that holds the value.</param>
/// <param name="Entry">The entry, where the owner is a mapping.</param>
/// <param name="Item">Index of the item, where the owner is a list.</param>
/// <param name="Rest">Keys that are not there yet, to be added to the value.</param>
internal sealed record KeyTarget(Node Owner, MappingEntry? Entry, int Item, IReadOnlyList<KeyStep> Rest)
{
    /// <summary>What stands there now; null where the owner lacks the key.</summary>
    public Node? Value => Owner is ListNode list ? list.Items[Item] : Entry?.Value;
}

/// <summary>Finds where a key leads.</summary>
internal static class KeyPath
{
    /// <summary>The target, or null with a fault.</summary>
    public static KeyTarget? Resolve(MappingNode root, IReadOnlyList<KeyStep> steps, FaultList faults)
    {
        Node node = root;
        KeyTarget? target = null;
        for (int i = 0; i < steps.Count; i++)
        {
            var step = steps[i];
            var next = step.IsItem ? Item(node, step, faults) : Key(node, steps, i, target, faults);
            if (next is null || next.Rest.Count > 0 || next.Value is null)
                return next;
            (target, node) = (next, next.Value!);
        }

        return target;
    }

    private static KeyTarget? Key(Node node, IReadOnlyList<KeyStep> steps, int at, KeyTarget? above, FaultList faults)
    {
        var step = steps[at];
        var rest = steps.Skip(at).ToList();
        if (node is MappingNode mapping && mapping.Find(step.Text) is { } entry)
            return new(node, entry, 0, []);
        bool canHold = node is MappingNode || (node is ScalarNode && !Section.TryNumber(node, out _) && above is not null);
        if (!canHold)
        {
            string hint = node is ListNode ? "; choose an item by [index] or [name]" : "";
            faults.Add(step.Place, $"{Shown.Quoted(step.Text)} is due in {node.Described} here, which has no keys{hint}.");
            return null;
        }

        if (rest.Find(later => later.IsItem) is { } item)
        {
            var keys = node is MappingNode known ? known.Entries.Select(other => other.Key.Text) : [];
            string nearest = Shown.Nearest(step.Text, keys) is { } word ? $" (nearest key: {word})" : "";
            faults.Add(item.Place, $"There is no list {Shown.Quoted(step.Text)} to choose [{item.Text}] from{nearest}.");
            return null;
        }

        return node is MappingNode ? new(node, null, 0, rest) : above! with { Rest = rest };
    }

    private static KeyTarget? Item(Node node, KeyStep step, FaultList faults)
    {
        if (node is not ListNode list)
        {
            faults.Add(step.Place, $"[{step.Text}] chooses from a list, but {node.Described} is there.");
            return null;
        }

        string?[] names = [.. list.Items.Select(NameOf)];
        int index = Array.IndexOf(names, step.Text);
        if (index < 0 && !(int.TryParse(step.Text, out index) && index >= 0 && index < list.Items.Count))
        {
            string range = list.Items.Count == 0 ? "the list is empty" : $"allowed is 0 to {list.Items.Count - 1}";
            string nearest = Shown.Nearest(step.Text, names.OfType<string>()) is { } word ? $" or a name (nearest: {word})" : "";
            faults.Add(step.Place, $"The list has no item [{step.Text}]; {range}{nearest}.");
            return null;
        }

        return new(list, null, index, []);
    }

    // Dots go by their lot's name, free loadings by the lot's name alone or in a mapping.
    internal static string? NameOf(Node item) => item is MappingNode mapping
        ? ((mapping.Find("name") ?? mapping.Find("lot"))?.Value as ScalarNode)?.Text
        : item is ScalarNode scalar && !Section.TryNumber(item, out _) ? scalar.Text : null;
}
