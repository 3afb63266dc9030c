import type { PageState } from "../state/page-state.ts";
import { TextField } from "../waypoints/TextField.tsx";
import { Menu } from "./Menu.tsx";

/** Units, time zone, theme and the user's own tile address. */
export function Settings({ page: { view } }: { readonly page: PageState }) {
  const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
  const zones = [...new Set(["UTC", own, view.zone.value])];
  return (
    <Menu name="Show as">
      <label>
        <span>Units</span>
        <select
          value={view.units.value}
          onChange={({ currentTarget: { value } }) => {
            view.units.value = value === "air" || value === "metric" ? value : "sea";
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
          {zones.map((zone) => (
            <option key={zone}>{zone}</option>
          ))}
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
          onText={(text) => {
            view.tiles.value = text.trim();
          }}
        />
      </div>
    </Menu>
  );
}
