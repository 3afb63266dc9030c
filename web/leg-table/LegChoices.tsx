import { Dialog } from "../shell/Dialog.tsx";
import type { PageState } from "../state/page-state.ts";
import type { LegUnits } from "../state/page-view.ts";
import { AMOUNTS, FIXED_COLUMNS, legColumns } from "./leg-columns.ts";

interface LegChoicesProps {
  readonly page: PageState;
  readonly onClose: () => void;
}

/** Which columns the leg table has, on the screen and on paper, and in which units. */
export function LegChoices({ page, onClose }: LegChoicesProps) {
  const { answers, store, view } = page;
  const { hiddenColumns } = view;
  const route = answers.answer.value.routes[store.selection.value.route] ?? null;
  if (route === null) return null;
  const columns = legColumns(route, {
    preset: view.units.value,
    zone: view.zone.value,
    clock: view.clock.value,
    own: view.legUnits.value,
  });
  const hidden = hiddenColumns.value;
  return (
    <Dialog title="Columns and units" onClose={onClose}>
      <fieldset>
        <legend>Columns</legend>
        <div class="choices">
          {columns.map(
            ({ key, heading, unit }) =>
              !FIXED_COLUMNS.includes(key) && (
                <label key={key}>
                  <input
                    type="checkbox"
                    checked={!hidden.includes(key)}
                    onChange={({ currentTarget: { checked } }) => {
                      const others = hidden.filter((each) => each !== key);
                      hiddenColumns.value = checked ? others : [...others, key];
                    }}
                  />
                  {heading} {unit.startsWith("°") && unit}
                </label>
              ),
          )}
        </div>
      </fieldset>
      <fieldset>
        <legend>Units</legend>
        <div class="selects">
          <UnitChoice page={page} kind="distance" name="Distance" symbols={["NM", "km", "m"]} />
          <UnitChoice page={page} kind="speed" name="Speed" symbols={["kn", "m/s", "km/h"]} />
          <UnitChoice page={page} kind="amount" name="Use and left" symbols={AMOUNTS[route.storeUnit]} />
        </div>
      </fieldset>
    </Dialog>
  );
}

interface UnitChoiceProps {
  readonly page: PageState;
  readonly kind: keyof LegUnits;
  readonly name: string;
  readonly symbols: readonly string[];
}

function UnitChoice({ page: { view }, kind, name, symbols }: UnitChoiceProps) {
  const { legUnits } = view;
  const chosen = legUnits.value[kind] ?? "";
  return (
    <label>
      <span>{name}</span>
      <select
        value={symbols.includes(chosen) ? chosen : ""}
        onChange={({ currentTarget: { value } }) => {
          const { [kind]: _old, ...others } = legUnits.value;
          legUnits.value = value === "" ? others : { ...others, [kind]: value };
        }}
      >
        <option value="">as elsewhere</option>
        {symbols.map((symbol) => (
          <option key={symbol}>{symbol}</option>
        ))}
      </select>
    </label>
  );
}
