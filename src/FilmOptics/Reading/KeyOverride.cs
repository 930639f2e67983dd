namespace FilmOptics.Reading;

/// <summary>One --set KEY=VALUE.</summary>
internal sealed record KeyOverride(string Option, IReadOnlyList<KeyStep> Steps, Node Value)
{
    private const int Longest = 20_000;

    /// <summary>The override, or null with a fault.</summary>
    public static KeyOverride? Parse(string text, FaultList faults)
    {
        string option = $"--set {(text.Length > 200 ? text[..200] + "…" : text)}";
        Place At(int index) => new(option, 1, index + 1);
        int equals = EqualsSign(text);
        if (text.Length > Longest || equals <= 0)
        {
            faults.Add(At(0), text.Length > Longest ? $"The option is over {Longest} characters long." : "KEY=VALUE is due, such as layers[0].thickness_um=80.");
            return null;
        }

        var steps = new List<KeyStep>();
        for (int i = 0; i < equals;)
        {
            bool isItem = text[i] == '[';
            int end = isItem ? text.IndexOf(']', i) : KeyEnd(text, i, equals);
            if (isItem && (end < 0 || end > equals))
            {
                faults.Add(At(i), "This bracket is not closed; [index] or [name] is due.");
                return null;
            }

            int start = isItem ? i + 1 : i;
            if (end == start || (isItem && steps.Count == 0))
            {
                faults.Add(At(i), "A key is due here, such as layers[0].thickness_um.");
                return null;
            }

            steps.Add(new(text[start..end], isItem, At(start)));
            i = isItem ? end + 1 : end;
            if (i < equals && text[i] == '.' && ++i == equals)
            {
                faults.Add(At(i), "A key is due after the dot.");
                return null;
            }
            else if (isItem && i < equals && text[i] != '[' && text[i - 1] != '.')
            {
                faults.Add(At(i), "A dot or = is due after a bracket.");
                return null;
            }
        }

        string value = text[(equals + 1)..];
        if (value.AsSpan().Trim().IsEmpty)
        {
            faults.Add(At(equals), "A value is due after the = sign.");
            return null;
        }

        return NodeComposer.Compose(value, At(equals + 1), faults) is { } node ? new(option, steps, node) : null;
    }

    /// <summary>Puts the value into the tree.</summary>
    public void ApplyTo(MappingNode root, FaultList faults)
    {
        if (KeyPath.Resolve(root, Steps, faults) is not { } target)
            return;
        var value = NewValue(target);
        if (target.Owner is ListNode list)
            list.Items[target.Item] = value;
        else
            ((MappingNode)target.Owner).Set(target.Entry?.Key ?? KeyNode(target.Rest[0]), value);
    }

    /// <summary>What the target's owner will hold: the value, below the keys that are added for it.</summary>
    public Node NewValue(KeyTarget target)
    {
        // A key that the owner lacks is the owner's own; only the keys after it make new mappings.
        var added = target.Value is null ? target.Rest.Skip(1) : target.Rest;
        var value = added.Reverse().Aggregate(Value, (inner, step) => new MappingNode(true, step.Place, default, [new(KeyNode(step), inner)]));
        if (target.Value is not ScalarNode { IsNull: false } scalar || target.Rest.Count == 0)
            return value;

        // led.csv becomes {file: led.csv, …}; a free lot becomes {lot: …, …}.
        string key = target.Owner is ListNode ? "lot" : "file";
        ((MappingNode)value).Entries.Insert(0, new(new(key, true, scalar.Place, default), scalar));
        return value;
    }

    private static ScalarNode KeyNode(KeyStep step) => new(step.Text, true, step.Place, default);

    // The first = outside brackets: a lot's name may hold one.
    private static int EqualsSign(string text)
    {
        for (int i = 0; i < text.Length; i++)
        {
            if (text[i] == '=')
                return i;
            if (text[i] == '[')
                i = Math.Max(i, text.IndexOf(']', i));
        }

        return -1;
    }

    private static int KeyEnd(string text, int start, int equals)
    {
        int length = text.AsSpan(start, equals - start).IndexOfAny('.', '[');
        return length < 0 ? equals : start + length;
    }
}
