import type { PageState } from "../state/page-state.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { isTileAddress, letsIn } from "./tile-policy.ts";

/** Units, time zone, theme and the user's own tile address. */
export function Settings({ page: { view } }: { readonly page: PageState }) {
  const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
  const near = [...new Set(["UTC", own, view.zone.value])];
  const others = Intl.supportedValuesOf("timeZone").filter((zone) => !near.includes(zone));
  return (
    <>
      <label>
        <span>Units</span>
        <select
          value={view.units.value}
          onChange={({ currentTarget: { value } }) => {
            view.units.value = value === "air" || value === "metric" ? value : "sea";
            view.unitsChosen.value = true;
          }}
        >
          <option value="sea">sea: NM, kn, m</option>
          <option value="air">air: NM, kn, ft</option>
          <option value="metric">metric: km, m/s, m</option>
        </select>
      </label>
      <label>
        <span>Times in</span>
        <select
          value={view.zone.value}
          onChange={({ currentTarget: { value } }) => {
            view.zone.value = value;
          }}
        >
          {near.map((zone) => (
            <option key={zone}>{zone}</option>
          ))}
          <optgroup label="other zones">
            {others.map((zone) => (
              <option key={zone}>{zone}</option>
            ))}
          </optgroup>
        </select>
      </label>
      <label>
        <span>Theme</span>
        <select
          value={view.theme.value}
          onChange={({ currentTarget: { value } }) => {
            view.theme.value = value === "light" || value === "dark" ? value : "auto";
          }}
        >
          <option value="auto">as the device</option>
          <option value="light">light</option>
          <option value="dark">dark</option>
        </select>
      </label>
      <div>
        <span>Raster tiles of your own</span>
        <TextField
          label="Address of raster tiles"
          value={view.tiles.value}
          placeholder="https://…/{z}/{x}/{y}.png"
          {...(isWrong(view.tiles.value) ? { faultId: FAULT } : {})}
          onText={(text) => {
            view.tiles.value = text.trim();
          }}
        />
        <TileNote tiles={view.tiles.value} />
      </div>
    </>
  );
}

const FAULT = "tiles-fault";

const isWrong = (tiles: string): boolean => tiles !== "" && !isTileAddress(tiles);

/** What stands between an address and its tiles: the page lets images in from the address that it began with. */
function TileNote({ tiles }: { readonly tiles: string }) {
  if (tiles === "") return null;
  if (isWrong(tiles)) {
    return (
      <p class="field-fault" id={FAULT}>
        An address of tiles begins with https:// and holds {"{z}, {x} and {y}"}.
      </p>
    );
  }
  if (letsIn(tiles)) return null;
  return (
    <>
      <p class="quiet">Tiles from a new address are let in when the page is loaded again.</p>
      <button type="button" onClick={() => window.location.reload()}>
        Load the page again
      </button>
    </>
  );
}
