using System.Reflection;
using System.Runtime.Loader;
using OdeDsl.Generators.Tests.Harness;
using OdeDsl.Modeling;

namespace OdeDsl.Generators.Tests.Vectors;

/// <summary>A model with vectors, compiled with its generated part: the user's own members beside the generated equations.</summary>
internal abstract class VectorRun
{
    public abstract DynamicSystem System { get; }

    /// <summary>A model of this class with other lengths.</summary>
    public abstract VectorRun With(params (string Length, int Value)[] lengths);

    /// <summary>The rates and observables from the members that the user wrote.</summary>
    public abstract double[] Written(double time, double[] state, double[] parameters);

    public abstract double[] JacobianVectorProduct(double time, double[] state, double[] parameters, double[] regime, double[] direction);

    public abstract double[] StateJacobianValues(double time, double[] state, double[] parameters, double[] regime);

    /// <summary>Calls every member once and returns the bytes the calls allocated on this thread.</summary>
    public abstract long AllocatedByEveryMember(double time, double[] state, double[] parameters);

    public static VectorRun Load(string source) => LoadAll("using System;\nusing OdeDsl;\n" + source)[0];

    /// <summary>All models of a source, compiled at once.</summary>
    public static VectorRun[] LoadAll(string source)
    {
        GeneratorRun run = Compiling.Run(source).WithoutProblems();
        using MemoryStream image = new();
        Assert.True(run.Output.Emit(image).Success);
        image.Position = 0;
        Assembly assembly = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image);
        return [.. assembly.GetTypes().Where(static type => type.GetCustomAttribute<OdeModelAttribute>() is not null).Select(static type =>
            type.GetInterfaces().Single(static face => face.Name.StartsWith("IOdeModel", StringComparison.Ordinal)).GetGenericArguments())
            .Select(static arguments => (VectorRun)Activator.CreateInstance(typeof(Of<,>).MakeGenericType(arguments), Activator.CreateInstance(arguments[0]))!)];
    }

    private sealed class Of<TModel, TSystem> : VectorRun
        where TModel : class, IOdeModel<TModel, TSystem>, new()
        where TSystem : struct, IOdeSystem
    {
        private const BindingFlags Members = BindingFlags.Instance | BindingFlags.Public | BindingFlags.NonPublic;

        private readonly TModel _model;

        public Of(TModel model) => (_model, System) = (model, DynamicSystem.Of(model));

        public override DynamicSystem System { get; }

        public override VectorRun With(params (string Length, int Value)[] lengths)
        {
            TModel model = new();
            foreach ((string length, int value) in lengths) typeof(TModel).GetProperty(length)!.SetValue(model, value);
            return new Of<TModel, TSystem>(model);
        }

        public override double[] Written(double time, double[] state, double[] parameters)
        {
            TModel model = _model.Copy();
            model.WriteState(state);
            model.WriteParameters(parameters);
            ModelDescription description = System.Description;
            List<double> values = [];
            foreach (string scalar in Enumerable.Range(0, description.States.ScalarCount).Select(i => description.States[i].Name))
                values.Add(Value(model, RateOf(scalar), time));
            foreach (VectorDescription vector in description.StateVectors)
            {
                for (int i = 0; i < vector.Count; i++)
                    values.Add(Value(model, RateOf(vector.Name), time, vector.Lengths.Length == 1 ? [i] : [i / vector.Lengths[1], i % vector.Lengths[1]]));
            }

            foreach (ObservableDescription observable in description.Observables)
                values.Add(Value(model, typeof(TModel).GetMember(observable.Name, Members).Single(), time));
            return [.. values];
        }

        private static MemberInfo RateOf(string state) =>
            typeof(TModel).GetMembers(Members).Single(member => member.GetCustomAttribute<RateAttribute>()?.State == state);

        private static double Value(TModel model, MemberInfo member, double time, params int[] indices)
        {
            Queue<int> left = new(indices);
            return (double)(member switch
            {
                PropertyInfo property => property.GetValue(model)!,
                MethodInfo method => method.Invoke(
                    model, [.. method.GetParameters().Select(parameter => parameter.ParameterType == typeof(int) ? (object)left.Dequeue() : time)])!,
                _ => throw new InvalidOperationException(),
            });
        }

        public override double[] JacobianVectorProduct(double time, double[] state, double[] parameters, double[] regime, double[] direction)
        {
            double[] product = Poisoned(System.StateCount);
            TSystem.JacobianVectorProduct(time, state, parameters, regime, direction, product);
            return product;
        }

        public override double[] StateJacobianValues(double time, double[] state, double[] parameters, double[] regime)
        {
            double[] values = Poisoned(System.Description.StateSparsity.EntryCount);
            TSystem.StateJacobianValues(time, state, parameters, regime, values);
            return values;
        }

        public override long AllocatedByEveryMember(double time, double[] state, double[] parameters)
        {
            int n = System.StateCount, s = System.SwitchCount;
            double[] regime = new double[s];
            double[] result = new double[Math.Max(n, s) * Math.Max(n, parameters.Length) + System.Description.Observables.Length];
            CallAll();
            long before = GC.GetAllocatedBytesForCurrentThread();
            CallAll();
            return GC.GetAllocatedBytesForCurrentThread() - before;

            void CallAll()
            {
                TSystem.Regime(time, state, parameters, regime);
                TSystem.Rates(time, state, parameters, result);
                TSystem.Rates(time, state, parameters, regime, result);
                TSystem.StateJacobian(time, state, parameters, regime, result);
                TSystem.StateJacobianValues(time, state, parameters, regime, result);
                TSystem.ParameterJacobian(time, state, parameters, regime, result);
                TSystem.TimeDerivative(time, state, parameters, regime, result);
                TSystem.JacobianVectorProduct(time, state, parameters, regime, state, result);
                TSystem.Observables(time, state, parameters, result);
                TSystem.SwitchingFunctions(time, state, parameters, regime, result);
                TSystem.SwitchingJacobian(time, state, parameters, regime, result);
                TSystem.SwitchingTimeDerivative(time, state, parameters, regime, result);
            }
        }
    }

    protected static double[] Poisoned(int length)
    {
        double[] result = new double[length];
        Array.Fill(result, double.NaN);
        return result;
    }
}
