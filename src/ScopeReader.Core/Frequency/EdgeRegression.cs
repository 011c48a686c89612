namespace ScopeReader.Frequency;

/// <summary>The period of edges by least squares over their index, rising and falling edges with a common period.</summary>
/// <remarks>
/// <para>u(P) = σ √(12/(M(M² − 1))) for M edges of one polarity with white timing noise σ. A mid level off centre moves the
/// two polarities apart and leaves the period alone.</para>
/// <para>Slow wander of the phase leaves distances that stay on one side for a while; the uncertainty is then that of the wander.</para>
/// </remarks>
public sealed class EdgeRegression
{
    private const int WanderBlocks = 10, FewestForWander = 50, FewestForStrays = 10;
    private const double OutlierMultiple = 8, LeastStray = 0.05, WanderLimit = 3;

    private readonly EdgeTrain[] _trains;

    private EdgeRegression(EdgeTrain rising, EdgeTrain falling) => _trains = [rising, falling];

    /// <summary>The period, in the unit of the instants.</summary>
    public double Period { get; private set; }

    /// <summary>Its standard uncertainty from the edges' distance to the grid; infinite where no edge is to spare.</summary>
    public double PeriodUncertainty { get; private set; }

    /// <summary>Standard uncertainty of the period for edges with a timing noise of one unit.</summary>
    public double UncertaintyFactor { get; private set; }

    /// <summary>Degrees of freedom of <see cref="PeriodUncertainty"/>.</summary>
    public int DegreesOfFreedom { get; private set; }

    /// <summary>Rms distance of the edges from the grid; 0 where no edge is to spare.</summary>
    public double Spread { get; private set; }

    /// <summary>Instant of rising edge 0 on the grid; null without rising edges.</summary>
    public double? RisingOrigin => Rising.Count > 0 ? Rising.Origin : null;

    /// <summary>Instant of falling edge 0 on the grid; null without falling edges.</summary>
    public double? FallingOrigin => Falling.Count > 0 ? Falling.Origin : null;

    /// <summary>Edges that the fit rests on.</summary>
    public int Edges { get; private set; }

    /// <summary>Edges that lie so far from the grid that they were left out.</summary>
    public int Outliers { get; private set; }

    /// <summary>The rising edges.</summary>
    internal EdgeTrain Rising => _trains[0];

    /// <summary>The falling edges.</summary>
    internal EdgeTrain Falling => _trains[1];

    /// <summary>Fits the period.</summary>
    /// <param name="rising">Instants of the rising edges, rising, in samples where <paramref name="samplePhase"/> is asked for.</param>
    /// <param name="falling">Instants of the falling edges, rising.</param>
    /// <param name="samplePhase">Fit the error of interpolation too (<see cref="SamplePhase"/>).</param>
    /// <returns>Null where no polarity has two edges.</returns>
    public static EdgeRegression? Fit(double[] rising, double[] falling, bool samplePhase = true)
    {
        ArgumentNullException.ThrowIfNull(rising);
        ArgumentNullException.ThrowIfNull(falling);
        if (rising.Length < 2 && falling.Length < 2)
            return null;
        double guess = EdgeTrain.GuessPeriod(rising, falling);
        var fit = new EdgeRegression(new EdgeTrain(rising, guess), new EdgeTrain(falling, guess));
        if (!fit.Line())
            return null;
        if (fit.LeaveStraysOut() && !fit.Line())
            return null;
        if (samplePhase && SamplePhase.TakeOut(fit._trains, fit.Period, fit.Edges, fit.SumOfSquares()) is { } phase)
        {
            fit.Period += phase.PeriodChange;
            fit.UncertaintyFactor = phase.UncertaintyFactor;
            fit.DegreesOfFreedom = fit.Edges - phase.Unknowns;
            fit.SetSpread(phase.SumOfSquares);
        }
        fit.WidenForWander();
        return fit;
    }

    // Sums about the middle of the record: an instant late in it has few digits to spare.
    private bool Line()
    {
        double sxx = 0, sxy = 0;
        var middles = new (double Number, double Instant)[2];
        Edges = 0;
        int polarities = 0;
        for (int g = 0; g < 2; g++)
        {
            EdgeTrain train = _trains[g];
            double n = 0, number = 0, instant = 0, first = train.Count > 0 ? train.Instants[0] : 0;
            for (int i = 0; i < train.Count; i++)
                if (train.Used[i])
                    (n, number, instant) = (n + 1, number + train.Numbers[i], instant + (train.Instants[i] - first));
            if (n == 0)
                continue;
            polarities++;
            Edges += (int)n;
            middles[g] = (number / n, first + instant / n);
            for (int i = 0; i < train.Count; i++)
                if (train.Used[i])
                {
                    double x = train.Numbers[i] - middles[g].Number;
                    sxx += x * x;
                    sxy += x * (train.Instants[i] - middles[g].Instant);
                }
        }
        if (!(sxx > 0))
            return false;
        Period = sxy / sxx;
        for (int g = 0; g < 2; g++)
            _trains[g].Origin = middles[g].Instant - Period * middles[g].Number;
        UncertaintyFactor = 1 / Math.Sqrt(sxx);
        DegreesOfFreedom = Edges - 1 - polarities;
        SetSpread(SumOfSquares());
        return Period > 0;
    }

    private double SumOfSquares()
    {
        double sum = 0;
        foreach (EdgeTrain train in _trains)
            for (int i = 0; i < train.Count; i++)
                if (train.Used[i])
                {
                    double distance = train.Distance(i, Period);
                    sum += distance * distance;
                }
        return sum;
    }

    private void SetSpread(double sumOfSquares)
    {
        Spread = DegreesOfFreedom > 0 ? Math.Sqrt(sumOfSquares / DegreesOfFreedom) : 0;
        PeriodUncertainty = DegreesOfFreedom > 0 ? Spread * UncertaintyFactor : double.PositiveInfinity;
    }

    private bool LeaveStraysOut()
    {
        if (Edges < FewestForStrays)
            return false;
        double furthest = 0;
        foreach (EdgeTrain train in _trains)
            for (int i = 0; i < train.Count; i++)
                furthest = Math.Max(furthest, Math.Abs(train.Distance(i, Period)));
        // Only clear strays: a rounding pattern can have a median of nothing.
        if (furthest < LeastStray * Period)
            return false;
        var distances = new double[Edges];
        int k = 0;
        foreach (EdgeTrain train in _trains)
            for (int i = 0; i < train.Count; i++)
                distances[k++] = Math.Abs(train.Distance(i, Period));
        Array.Sort(distances);
        double most = Math.Max(OutlierMultiple * 1.4826 * distances[Edges / 2], LeastStray * Period);
        foreach (EdgeTrain train in _trains)
            for (int i = 0; i < train.Count; i++)
                if (Math.Abs(train.Distance(i, Period)) > most)
                {
                    train.Used[i] = false;
                    Outliers++;
                }
        return Outliers > 0;
    }

    // Slow wander of the phase (a real oscillator's, or the digitiser's) leaves residuals that stay on one side for a while:
    // their means over tenths of the record are then larger than white noise makes them, and so is u(P).
    private void WidenForWander()
    {
        if (Edges < FewestForWander || !(Spread > 0))
            return;
        var sums = new double[WanderBlocks];
        var counts = new int[WanderBlocks];
        foreach (EdgeTrain train in _trains)
            for (int i = 0; i < train.Count; i++)
                if (train.Used[i])
                {
                    int block = (int)((long)i * WanderBlocks / train.Count);
                    sums[block] += train.Distance(i, Period);
                    counts[block]++;
                }
        double ratio = 0;
        for (int b = 0; b < WanderBlocks; b++)
            if (counts[b] > 0)
                ratio += sums[b] * sums[b] / counts[b] / (Spread * Spread);
        ratio /= WanderBlocks - 2;
        if (ratio <= WanderLimit)
            return;
        // Steps from block mean to block mean are independent for white frequency noise, the least that wander can be.
        double cycles = (double)Edges / WanderBlocks / _trains.Count(t => t.Count > 0), squares = 0;
        for (int b = 1; b < WanderBlocks; b++)
        {
            double step = (sums[b] / counts[b] - sums[b - 1] / counts[b - 1]) / cycles;
            squares += step * step;
        }
        PeriodUncertainty = Math.Max(PeriodUncertainty, Math.Sqrt(squares / (WanderBlocks - 2) / (WanderBlocks - 1)));
        DegreesOfFreedom = WanderBlocks - 2;
    }
}
