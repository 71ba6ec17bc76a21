using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Texts of whole numbers: places in vectors, lengths and bounds of loops.</summary>
internal sealed class VectorLayout(ModelDefinition model, IReadOnlyDictionary<int, string> symbolNames)
{
    private readonly VectorPart _vectors = model.Vectors!;

    public string StateCount => Sum(model.States.Count, _vectors.States.Select(state => Count(state.Lengths)));

    public string ParameterCount => Sum(model.Parameters.Count, _vectors.Parameters.Select(parameter => Count(parameter.Lengths)));

    /// <summary>Where a vector begins among the states or the parameters.</summary>
    public string Start(bool isParameter, int vector) => isParameter
        ? Sum(model.Parameters.Count, _vectors.Parameters.Take(vector).Select(parameter => Count(parameter.Lengths)))
        : Sum(model.States.Count, _vectors.States.Take(vector).Select(state => Count(state.Lengths)));

    public EquatableArray<Affine> LengthsOf(bool isParameter, int vector) =>
        isParameter ? _vectors.Parameters[vector].Lengths : _vectors.States[vector].Lengths;

    /// <summary>Where an element lies among the states or the parameters.</summary>
    public string Place(bool isParameter, int vector, IReadOnlyList<Affine> indices) =>
        Plus(Start(isParameter, vector), Offset(indices, LengthsOf(isParameter, vector)));

    /// <summary>Where an element lies in its vector: rows one after another.</summary>
    public string Offset(IReadOnlyList<Affine> indices, IReadOnlyList<Affine> lengths) => indices.Count == 1
        ? Text(indices[0])
        : Plus(Times(Text(indices[0]), Text(lengths[1])), Text(indices[1]));

    public string Count(IEnumerable<Affine> lengths) => lengths.Select(Text).Aggregate(Times);

    /// <summary>The number of rows of a group.</summary>
    public string Count(RowGroup group) => group.Ranges.Select(range => Text(range.Upper - range.Lower)).DefaultIfEmpty("1").Aggregate(Times);

    public string Text(Affine number)
    {
        string text = "";
        foreach (AffineTerm term in number.Terms.OrderByDescending(static term => term.Factor))
        {
            string name = symbolNames[term.Symbol];
            string size = System.Math.Abs(term.Factor) == 1 ? name : Literals.Integer((int)System.Math.Abs(term.Factor)) + " * " + name;
            text = text.Length == 0 ? (term.Factor < 0 ? "-" : "") + size : text + (term.Factor < 0 ? " - " : " + ") + size;
        }

        if (text.Length == 0) return Literals.Integer((int)number.Constant);
        if (number.Constant == 0) return text;
        return text + (number.Constant < 0 ? " - " : " + ") + Literals.Integer((int)System.Math.Abs(number.Constant));
    }

    public static string Plus(string a, string b) => a == "0" ? b : b == "0" ? a : b[0] == '-' ? $"{a} - {b.Substring(1)}" : $"{a} + {b}";

    public static string Times(string a, string b)
    {
        if (a == "0" || b == "0") return "0";
        if (a == "1") return b;
        return b == "1" ? a : $"{Atom(a)} * {Atom(b)}";
    }

    public static string Sum(int first, IEnumerable<string> others) => others.Aggregate(Literals.Integer(first), Plus);

    private static string Atom(string text) => text.IndexOf(' ') < 0 && text[0] != '-' ? text : "(" + text + ")";
}
