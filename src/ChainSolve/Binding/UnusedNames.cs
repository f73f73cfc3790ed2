namespace ChainSolve.Binding;

/// <summary>Warns of quantities that nothing uses, and looks into functions that nothing calls.</summary>
internal sealed class UnusedNames(BindContext context, NameTable names, ExpressionBinder expressions)
{
    public void Report()
    {
        foreach (var function in names.All.OfType<LetSymbol>().Where(l => l is { IsFunction: true, IsUsed: false, IsCyclic: false }))
        {
            // Its parameters are of no type, so that only names can be judged.
            context.Sink.Enter(function.Syntax);
            var locals = new Dictionary<string, BoundValue?>(StringComparer.Ordinal);
            foreach (var parameter in function.Syntax.Parameters!)
            {
                locals[parameter.Text] = null;
            }

            expressions.Bind(function.Syntax.Value, new ExprScope { Locals = locals });
        }

        // Lets and rewards are there for measures: without any, that is what is missing.
        var hasMeasures = names.All.OfType<MeasureSymbol>().Any();
        foreach (var symbol in names.All.Where(s => !s.IsUsed))
        {
            if (symbol is GivenSymbol or CrewSymbol || (hasMeasures && symbol is LetSymbol or RewardSymbol))
            {
                context.Sink.Warn(BindingFaults.Unused(symbol));
            }
        }
    }
}
