using System.Globalization;

namespace ScopeReader.Signals;

/// <summary>What times written with few digits still say of the sample interval.</summary>
public static class RoundedTimes
{
    /// <summary>A time as a file with so many significant digits has it.</summary>
    public static double Round(double time, int digits) =>
        double.Parse(time.ToString("E" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    /// <summary>The shortest and longest interval of an even spacing that lies within half a last digit of every rounded time.</summary>
    /// <remarks>
    /// An interval h is possible when some start satisfies every time: max(tᵢ − rᵢ − h i) ≤ min(tᵢ + rᵢ − h i), r half a last
    /// digit. The difference of the two is convex in h and the true interval is possible, so each end is found by bisection.
    /// </remarks>
    public static (double Low, double High) IntervalRange(double start, double interval, int count, int digits)
    {
        double[] times = new double[count], halves = new double[count];
        for (int i = 0; i < count; i++)
        {
            times[i] = Round(start + i * interval, digits);
            // The last digit of 0 is unknown; that of its neighbour is the finest that the file shows.
            double scale = times[i] == 0 ? interval : Math.Abs(times[i]);
            halves[i] = 0.5 * Math.Pow(10, Math.Floor(Math.Log10(scale)) - digits + 1);
        }
        return (End(-1), End(1));

        double End(int side)
        {
            double inside = 0, outside = interval;
            for (int k = 0; k < 50; k++)
            {
                double middle = (inside + outside) / 2;
                if (Possible(interval + side * middle))
                    inside = middle;
                else
                    outside = middle;
            }
            return interval + side * inside;
        }

        bool Possible(double h)
        {
            double latest = double.NegativeInfinity, earliest = double.PositiveInfinity;
            for (int i = 0; i < count; i++)
            {
                latest = Math.Max(latest, times[i] - halves[i] - h * i);
                earliest = Math.Min(earliest, times[i] + halves[i] - h * i);
            }
            return latest <= earliest;
        }
    }
}
