import { Figure } from "#app/components/ui/Figure";

export interface ClearanceLimitRow {
  /** "this run's plan", "finding F-7, hose rub". */
  name: string;
  /** Where it comes from: "run card, version 3". */
  source: string;
  /** For the bar's length, in any one unit. */
  rpm: number;
  /** As shown: "1,375". */
  text: string;
  /** The least one: this is what binds. */
  binds: boolean;
}

interface ClearanceBarsProps {
  limits: ClearanceLimitRow[];
  unit?: string;
  caption?: string;
}

/** Which limit binds: one bar a limit, the least one filled, its end drawn down across the others. */
export function ClearanceBars({ limits, unit = "rpm", caption = `Limits in ${unit}, the least binds` }: ClearanceBarsProps) {
  const top = Math.max(1, ...limits.map((limit) => limit.rpm)) * 1.04;
  const least = Math.min(...limits.map((limit) => limit.rpm));
  return (
    <table className="clearance-bars" style={{ "--cut": `${((least / top) * 100).toFixed(2)}%` }}>
      <caption className="sr-only">{caption}</caption>
      <thead className="sr-only">
        <tr>
          <th scope="col">Limit</th>
          <th scope="col">Drawn</th>
          <th scope="col">{unit}</th>
        </tr>
      </thead>
      <tbody>
        {limits.map((limit) => (
          <tr key={limit.name + limit.source} className={limit.binds ? "binds" : undefined}>
            <th scope="row">
              {limit.name}
              {limit.binds && " "}
              {limit.binds && <span className="sr-only">(binds)</span>} <span className="clearance-source">{limit.source}</span>
            </th>
            <td className="clearance-bar">
              <i style={{ width: `${((limit.rpm / top) * 100).toFixed(2)}%` }} />
            </td>
            <td className="clearance-value">
              <Figure value={limit.text} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
