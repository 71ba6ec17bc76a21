using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>The names a model's numbers have in every printed method: taken from the model, unique against one another and the arguments.</summary>
internal sealed class ModelNames
{
    private static readonly string[] Arguments =
        ["time", "state", "parameters", "regime", "direction", "rates", "jacobian", "values", "derivative", "product", "scratch"];

    private readonly List<string> _taken = [.. Arguments];
    private readonly string[] _states;
    private readonly string[] _parameters;
    private readonly string[] _directions;

    public ModelNames(ModelDefinition model)
    {
        Tables = [.. model.Tables.Select(static table => table.Access)];
        NameScope scope = new(Arguments);
        _states = [.. model.States.Select(state => Claim(scope, Identifiers.Local(state.Property.Name)))];
        // The modes, the inputs and their slopes follow the parameters in the same vector.
        IEnumerable<string> constants = [
            .. model.Parameters.Select(static parameter => parameter.Property.Name),
            .. model.Modes.Select(static mode => mode.Property.Name),
            .. model.Inputs.Select(static input => input.Property.Name),
            .. model.Inputs.Select(static input => input.Property.Name + "Slope"),
        ];
        _parameters = [.. constants.Select(name => Claim(scope, Identifiers.Local(name)))];
        _directions = [.. model.States.Select(state => Claim(scope, Identifiers.Local(state.Property.Name) + "Direction"))];
    }

    /// <summary>The expressions that reach the tables.</summary>
    public IReadOnlyList<string> Tables { get; }

    /// <summary>The local that a leaf is read into, or <see langword="null"/> if it is read where it is used.</summary>
    public string? LocalOf(Node leaf) => leaf.Operator switch
    {
        Operator.State => Identifiers.Escape(_states[leaf.Index]),
        Operator.Parameter or Operator.Mode or Operator.Input or Operator.InputSlope => Identifiers.Escape(_parameters[leaf.Index]),
        Operator.Direction => Identifiers.Escape(_directions[leaf.Index]),
        _ => null,
    };

    /// <summary>The expression that reads a leaf from the arguments.</summary>
    public static string Access(Node leaf) => leaf.Operator switch
    {
        Operator.State => $"state[{Literals.Integer(leaf.Index)}]",
        Operator.Parameter or Operator.Mode or Operator.Input or Operator.InputSlope => $"parameters[{Literals.Integer(leaf.Index)}]",
        Operator.Direction => $"direction[{Literals.Integer(leaf.Index)}]",
        Operator.Side => $"regime[{Literals.Integer(leaf.Index)}] == 1d",
        Operator.WholeNumber => $"regime[{Literals.Integer(leaf.Index)}]",
        _ => "time",
    };

    /// <summary>The argument that a leaf is read from.</summary>
    public static string ArgumentOf(Node leaf) => leaf.Operator switch
    {
        Operator.State => "state",
        Operator.Parameter or Operator.Mode or Operator.Input or Operator.InputSlope => "parameters",
        Operator.Direction => "direction",
        Operator.Side or Operator.WholeNumber => "regime",
        _ => "time",
    };

    /// <summary>A scope for the further locals of a method that reads the model's numbers into locals.</summary>
    public NameScope NewScope() => new(_taken);

    /// <summary>A scope for the locals of a method that only has its arguments.</summary>
    public static NameScope NewScopeOfArguments() => new(Arguments);

    private string Claim(NameScope scope, string wanted)
    {
        string name = scope.Claim(wanted);
        _taken.Add(name);
        return name;
    }
}
