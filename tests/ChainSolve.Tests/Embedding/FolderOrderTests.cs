using System.Reflection;

namespace ChainSolve.Tests.Embedding;

/// <summary>Data goes one way through the folders of the library: none knows of one that comes after it.</summary>
public class FolderOrderTests
{
    private const BindingFlags Declared =
        BindingFlags.DeclaredOnly | BindingFlags.Instance | BindingFlags.Static | BindingFlags.Public | BindingFlags.NonPublic;

    /// <summary>The order of the table in the guide for developers; types of the root stand between the last two.</summary>
    private static readonly string[] Order = ["Expressions", "Modelling", "Binding", "StateSpace", "Generators", "Measures", "Reports"];

    [Fact]
    public void Types_OfAFolder_UseNoneThatComesAfterIt()
    {
        var types = typeof(Model).Assembly.GetTypes().Where(t => RankOf(t) is not null).ToList();
        Assert.Equal(Order.Order(), types.Select(t => t.Namespace!.Split('.')[1]).Distinct().Order());

        var faults =
            from type in types
            from used in UsedBy(type).SelectMany(Parts).Distinct()
            where RankOf(used) > RankOf(type)
            select $"{type.FullName} uses {used.FullName}";
        Assert.Empty(faults.Distinct());
    }

    private static int? RankOf(Type type) =>
        type.Assembly == typeof(Model).Assembly && type.Namespace?.Split('.') is ["ChainSolve", var folder, ..] ? Array.IndexOf(Order, folder) : null;

    /// <summary>The types in the heads and the local variables of all members.</summary>
    private static IEnumerable<Type?> UsedBy(Type type) =>
    [
        type.BaseType,
        .. type.GetInterfaces(),
        .. type.GetFields(Declared).Select(f => f.FieldType),
        .. type.GetMethods(Declared).Select(m => m.ReturnType),
        .. type.GetMembers(Declared).OfType<MethodBase>().SelectMany(m =>
            m.GetParameters().Select(p => p.ParameterType).Concat(m.GetMethodBody()?.LocalVariables.Select(v => v.LocalType) ?? [])),
    ];

    private static IEnumerable<Type> Parts(Type? type) =>
        type is null ? []
        : type.HasElementType ? Parts(type.GetElementType())
        : [type, .. type.GetGenericArguments().SelectMany(Parts)];
}
