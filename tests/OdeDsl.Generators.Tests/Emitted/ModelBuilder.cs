using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>Builds a model definition by hand, as the reader would from source.</summary>
internal sealed class ModelBuilder
{
    private readonly List<(string Name, double Initial)> _states = [];
    private readonly List<(string Name, double Value)> _parameters = [];
    private readonly List<ObservableDefinition> _observables = [];
    private readonly List<ConditionText> _texts = [];
    private readonly Dictionary<int, (int Node, string Text)> _rates = [];

    public ExpressionGraph Graph { get; } = new();

    public string Name { get; init; } = "Sample";

    public int Time => Graph.Leaf(Operator.Time);

    public int State(string name, double initial = 1.0)
    {
        _states.Add((name, initial));
        return Graph.Leaf(Operator.State, _states.Count - 1);
    }

    public int Parameter(string name, double value = 1.0)
    {
        _parameters.Add((name, value));
        return Graph.Leaf(Operator.Parameter, _parameters.Count - 1);
    }

    public void Rate(int state, int node, string text = "") => _rates[state] = (node, text);

    public void Observable(string name, int node) => _observables.Add(new ObservableDefinition(name, "", "", node, name));

    public int Text(int node, string text)
    {
        _texts.Add(new ConditionText(node, text));
        return node;
    }

    public ModelDefinition Build(params string[] takenNames)
    {
        EquatableArray<StateDefinition> states = new([.. _states.Select((state, i) => new StateDefinition(
            Property(state.Name), "m", Bits(state.Initial), Bits(double.NegativeInfinity), Bits(double.PositiveInfinity), null, _rates[i].Node, _rates[i].Text))]);
        EquatableArray<ParameterDefinition> parameters = new([.. _parameters.Select(parameter => new ParameterDefinition(
            Property(parameter.Name), "", Bits(parameter.Value), Bits(double.NegativeInfinity), Bits(double.PositiveInfinity)))]);
        TypeChain type = new("Models", new EquatableArray<TypeLink>([new TypeLink("class", Name, "")]), "Models." + Name);
        return new ModelDefinition(
            type, "", states, parameters, new([.. _observables]), new([.. Graph.Nodes]), new([.. _texts]),
            new([.. _states.Select(static s => s.Name), .. _parameters.Select(static p => p.Name), .. takenNames]));
    }

    private static long Bits(double value) => BitConverter.DoubleToInt64Bits(value);

    public static PropertyDefinition Property(string name) => new(name, "", "public", new EquatableArray<string>(["get", "set"]));
}
