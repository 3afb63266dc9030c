/** Cases of the catalogue that no check of this folder is about, with the reason. */
export const NOT_YET_COVERED: Readonly<Record<string, string>> = {
  "ZER-01": "least-time steering between two points is not offered: a track is given and held",
  "ZER-02": "least-time steering between two points is not offered: a track is given and held",
  "ZER-05": "least-time steering between two points is not offered: a track is given and held",
  "ENE-05": "no friction line: a ship's resistance comes as its own speed-power table",
  "ENE-06": "no resistance prediction from hull dimensions: a speed-power table is given",
  "ENE-08": "no table of wind coefficients by ship type: one drag coefficient is given",
  "ENE-10": "no table of wind coefficients by ship type: one drag coefficient is given",
  "PRO-01":
    "no wind profile law: heights between levels are interpolated, outside them the nearest level holds",
  "PRO-03":
    "no wind profile law: heights between levels are interpolated, outside them the nearest level holds",
  "UNIT-03": "the Beaufort scale is not used: winds are in knots or metres a second",
  "SAFE-01": "stages of a voyage plan, for the wording of caveats only",
  "SAFE-02": "no state's reserve rule is built in: the reserve is the user's own",
  "SAFE-03": "no figure is prescribed: the reserve is the user's own",
};

/** Quantities that are left out of cases which are otherwise covered, as `case.quantity`, with the reason. */
export const LEFT_OUT: Readonly<Record<string, string>> = {
  "SAIL-03.midlat_lat2_deg": "mid-latitude sailing is an approximation that is not offered",
  "SAIL-03.midlat_lon2_deg": "mid-latitude sailing is an approximation that is not offered",
  "SAIL-03.departure_nm": "mid-latitude sailing is an approximation that is not offered",
  "LINE-12.u0_ms": "a constant of the case's own wind, taken from it",
  "LINE-12.h0_m": "a constant of the case's shallow-water problem; no figure of ours depends on it",
  "ATM-03.rule_of_thumb_ft": "a rule of thumb that is not offered",
  "ATM-05.geopotential_m": "heights are not changed from geometric to geopotential: taken from the case",
  "UNIT-02.authalic_R2_m": "the authalic radius is not used",
};
