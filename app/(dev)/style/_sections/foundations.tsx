import { Card } from "@/components/ui/card";
import { FamilyGlyph } from "@/components/ui/family-glyph";
import { Wordmark } from "@/components/ui/wordmark";
import { FAMILY_CODES } from "@/lib/parts/families";

const GROUNDS = ["bg-paper", "bg-card", "bg-well"] as const;
const INKS = [
  "text-ink",
  "text-ink-2",
  "text-ink-3",
  "text-petrol",
  "text-petrol-deep",
  "text-focus",
] as const;
const SERIES = ["bg-series-1", "bg-series-2", "bg-series-3", "bg-series-4", "bg-series-5"] as const;
const SIZES = ["text-40", "text-30", "text-24", "text-20"] as const;

/** Type, colour, the name and the seven families. */
export function Foundations() {
  return (
    <Card title="Type and colour">
      <Wordmark />
      {SIZES.map((size) => (
        <p key={size} className={`font-heading font-semibold ${size}`}>
          Brake will not hold
        </p>
      ))}
      <p className="max-w-measure">
        In term until 3 May 2027, 211 days left. Cold: 11.4 ohm at 21 °C. Zażółć gęślą jaźń, Ω µ ≤ ≥ →.
        <span className="font-mono"> 0Oo 1lI 8B 5S</span>
      </p>
      <ul className="mt-3 flex flex-wrap gap-2 text-14">
        {GROUNDS.map((ground) => (
          <li key={ground} className={`border border-edge px-3 py-2 ${ground}`}>
            {INKS.map((ink) => (
              <span key={ink} className={`block ${ink}`}>
                {ink.slice(5)}
              </span>
            ))}
          </li>
        ))}
        {SERIES.map((series) => (
          <li key={series} className={`size-10 ${series}`} />
        ))}
      </ul>
      <ul className="mt-4 flex flex-wrap gap-5 text-14">
        {FAMILY_CODES.map((family) => (
          <li key={family} className="grid justify-items-center gap-1 text-petrol">
            <FamilyGlyph family={family} className="size-10" />
            <span className="flex items-center gap-1 text-ink">
              <FamilyGlyph family={family} />
              {family}
            </span>
          </li>
        ))}
      </ul>
    </Card>
  );
}
