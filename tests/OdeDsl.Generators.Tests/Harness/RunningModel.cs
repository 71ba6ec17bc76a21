using System.Reflection;
using System.Runtime.Loader;
using Microsoft.CodeAnalysis;
using OdeDsl.Modeling;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>A model compiled with its generated part and loaded: its own members beside the generated equations.</summary>
internal abstract class RunningModel
{
    public abstract ModelDescription Description { get; }

    /// <summary>The generated rates, then the generated observables.</summary>
    public abstract double[] Generated(double time, double[] state, double[] parameters);

    /// <summary>The same numbers from the members the user wrote.</summary>
    public abstract double[] Written(double time, double[] state, double[] parameters);

    /// <summary>The members' names in that order.</summary>
    public abstract IReadOnlyList<string> Names { get; }

    public static RunningModel Load(params string[] sources) => Load(Compiling.Run(sources).WithoutProblems());

    public static RunningModel Load(GeneratorRun run, params Type[] typeArguments)
    {
        using MemoryStream image = new();
        var emitted = run.Output.Emit(image);
        Assert.True(emitted.Success, string.Join("\n", emitted.Diagnostics.Where(static problem => problem.Severity == DiagnosticSeverity.Error)));
        image.Position = 0;
        Assembly assembly = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image);
        Type model = assembly.GetTypes().Single(static type => type.GetCustomAttribute<OdeModelAttribute>() is not null);
        if (model.IsGenericTypeDefinition) model = model.MakeGenericType(typeArguments);
        Type contract = model.GetInterfaces().Single(static face => face.Name.StartsWith("IOdeModel", StringComparison.Ordinal));
        return (RunningModel)Activator.CreateInstance(typeof(Of<,>).MakeGenericType(contract.GetGenericArguments()))!;
    }

    /// <summary>Compares every rate and observable with the user's own member, bit for bit; all NaN count as equal.</summary>
    public void AssertFaithful(double time, double[] state, double[] parameters)
    {
        double[] written = Written(time, state, parameters);
        double[] generated = Generated(time, state, parameters);
        for (int i = 0; i < written.Length; i++)
        {
            bool same = BitConverter.DoubleToInt64Bits(written[i]) == BitConverter.DoubleToInt64Bits(generated[i])
                || (double.IsNaN(written[i]) && double.IsNaN(generated[i]));
            string text = i < state.Length ? "" : Description.Observables[i - state.Length].Text;
            Assert.True(
                same,
                $"{Names[i]} at t = {time:R}, state ({string.Join("; ", state)}), parameters ({string.Join("; ", parameters)}): "
                + $"written {written[i]:R}, generated {generated[i]:R}\n{text}");
        }
    }

    private sealed class Of<TModel, TSystem> : RunningModel
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        private const BindingFlags Members = BindingFlags.Instance | BindingFlags.Public | BindingFlags.NonPublic;

        private readonly MemberInfo[] _members;

        public Of()
        {
            MemberInfo[] all = typeof(TModel).GetMembers(Members);
            _members =
            [
                .. Description.States.Select(state => all.Single(member => member.GetCustomAttribute<RateAttribute>()?.State == state.Name)),
                .. Description.Observables.Select(observable => all.Single(member =>
                    member.Name == observable.Name && member.GetCustomAttribute<ObservableAttribute>() is not null)),
            ];
        }

        public override ModelDescription Description => TSystem.Description;

        public override IReadOnlyList<string> Names => [.. _members.Select(static member => member.Name)];

        public override double[] Generated(double time, double[] state, double[] parameters)
        {
            double[] rates = new double[Description.States.Length];
            double[] observables = new double[Description.Observables.Length];
            TSystem.Rates(time, state, parameters, rates);
            TSystem.Observables(time, state, parameters, observables);
            return [.. rates, .. observables];
        }

        public override double[] Written(double time, double[] state, double[] parameters)
        {
            TModel model = Activator.CreateInstance<TModel>();
            model.WriteState(state);
            model.WriteParameters(parameters);
            return [.. _members.Select(member => (double)(member switch
            {
                PropertyInfo property => property.GetValue(model)!,
                MethodInfo { } method => method.Invoke(model, method.GetParameters().Length == 0 ? [] : [time])!,
                _ => throw new InvalidOperationException(),
            }))];
        }
    }
}
