using System.Reflection.Emit;

namespace ChainSolve.StateSpace;

/// <summary>Writes the code that unpacks a key into local variables, as a <see cref="KeyCodec{TKey}"/> unpacks it into a marking.</summary>
/// <param name="il">Takes the code.</param>
/// <param name="layout">How a key is made up.</param>
/// <param name="key">The words of the key, the lowest first.</param>
/// <param name="variables">One a variable of the model; all are 0 before.</param>
internal sealed class UnpackEmitter(ILGenerator il, StateLayout layout, LocalBuilder[] key, LocalBuilder[] variables)
{
    public void Emit()
    {
        foreach (var counter in layout.Counters)
        {
            Set(counter.Variable, counter.Low);
        }

        foreach (var field in layout.Fields)
        {
            if (field.Kind == FieldKind.Place)
            {
                EmitPlaces(field);
            }
            else
            {
                PutValue(field);
                il.Emit(OpCodes.Ldc_I4, field.Low);
                il.Emit(OpCodes.Add);
                il.Emit(OpCodes.Stloc, variables[field.Variable]);
            }
        }

        for (var i = 0; i < layout.Counts.Length; i++)
        {
            EmitLast(layout.Model.Items[i].FirstVariable, layout.Model.Items[i].States.Count, layout.Counts[i]);
        }
    }

    private void EmitPlaces(KeyField field)
    {
        for (var place = 0; place < field.Places; place++)
        {
            PutValue(field);
            il.Emit(OpCodes.Ldc_I4, place);
            il.Emit(OpCodes.Ceq);
            il.Emit(OpCodes.Stloc, variables[field.Variable + place]);
        }
    }

    // The last place holds what the others leave.
    private void EmitLast(int first, int places, int count)
    {
        if (count == 1 && places > 1)
        {
            return;
        }

        var last = first + places - 1;
        il.Emit(OpCodes.Ldc_I4, count);
        for (var v = first; v < last; v++)
        {
            il.Emit(OpCodes.Ldloc, variables[v]);
            il.Emit(OpCodes.Sub);
        }

        il.Emit(OpCodes.Stloc, variables[last]);
    }

    private void Set(int variable, int value)
    {
        il.Emit(OpCodes.Ldc_I4, value);
        il.Emit(OpCodes.Stloc, variables[variable]);
    }

    private void PutValue(KeyField field)
    {
        var (word, shift) = (field.Shift / 64, field.Shift % 64);
        il.Emit(OpCodes.Ldloc, key[word]);
        il.Emit(OpCodes.Ldc_I4, shift);
        il.Emit(OpCodes.Shr_Un);
        if (shift + field.Width > 64)
        {
            il.Emit(OpCodes.Ldloc, key[word + 1]);
            il.Emit(OpCodes.Ldc_I4, 64 - shift);
            il.Emit(OpCodes.Shl);
            il.Emit(OpCodes.Or);
        }

        il.Emit(OpCodes.Ldc_I8, (1L << field.Width) - 1);
        il.Emit(OpCodes.And);
        il.Emit(OpCodes.Conv_I4);
    }
}
