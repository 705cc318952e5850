using System.Reflection;
using System.Reflection.Emit;

namespace PartCheck.Tests.Architecture;

/// <summary>Every type that a compiled type mentions: in its signatures, its fields and the bodies of its methods.</summary>
internal static class CompiledReferences
{
    private const BindingFlags Everything =
        BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly;

    private static readonly Dictionary<short, OpCode> OpCodeOf = typeof(OpCodes).GetFields(BindingFlags.Public | BindingFlags.Static)
        .Select(f => (OpCode)f.GetValue(null)!).ToDictionary(o => o.Value);

    public static HashSet<Type> Of(Type type)
    {
        HashSet<Type> found = [];
        Add(found, type.BaseType);
        foreach (Type contract in type.GetInterfaces())
        {
            Add(found, contract);
        }

        foreach (FieldInfo field in type.GetFields(Everything))
        {
            Add(found, field.FieldType);
        }

        foreach (MethodBase method in type.GetMethods(Everything).Cast<MethodBase>().Concat(type.GetConstructors(Everything)))
        {
            foreach (ParameterInfo parameter in method.GetParameters())
            {
                Add(found, parameter.ParameterType);
            }

            Add(found, (method as MethodInfo)?.ReturnType);
            Body(found, type, method);
        }

        return found;
    }

    private static void Body(HashSet<Type> found, Type type, MethodBase method)
    {
        if (method.GetMethodBody() is not { } body || body.GetILAsByteArray() is not { } code)
        {
            return;
        }

        foreach (LocalVariableInfo local in body.LocalVariables)
        {
            Add(found, local.LocalType);
        }

        Type[]? typeArguments = type.IsGenericType ? type.GetGenericArguments() : null;
        Type[]? methodArguments = method.IsGenericMethod ? method.GetGenericArguments() : null;
        for (int at = 0; at < code.Length;)
        {
            short value = code[at] == 0xFE ? (short)(0xFE00 | code[++at]) : code[at];
            at++;
            OpCode op = OpCodeOf[value];
            if (op.OperandType is OperandType.InlineMethod or OperandType.InlineField or OperandType.InlineType or OperandType.InlineTok)
            {
                MemberInfo? member = type.Module.ResolveMember(BitConverter.ToInt32(code, at), typeArguments, methodArguments);
                Add(found, member as Type ?? member?.DeclaringType);
                if (member is MethodInfo { IsGenericMethod: true } generic)
                {
                    foreach (Type argument in generic.GetGenericArguments())
                    {
                        Add(found, argument);
                    }
                }
            }

            at += op.OperandType switch
            {
                OperandType.InlineNone => 0,
                OperandType.ShortInlineBrTarget or OperandType.ShortInlineI or OperandType.ShortInlineVar => 1,
                OperandType.InlineVar => 2,
                OperandType.InlineI8 or OperandType.InlineR => 8,
                OperandType.InlineSwitch => 4 + (4 * BitConverter.ToInt32(code, at)),
                _ => 4,
            };
        }
    }

    private static void Add(HashSet<Type> found, Type? type)
    {
        if (type is null || type.IsGenericParameter)
        {
            return;
        }

        if (type.HasElementType)
        {
            Add(found, type.GetElementType());
            return;
        }

        if (found.Add(type) && type.IsGenericType)
        {
            foreach (Type argument in type.GetGenericArguments())
            {
                Add(found, argument);
            }
        }
    }
}
