/* The parts of geomagnetism that compute, without the older models that its index brings along. */

declare module "geomagnetism/lib/model.js" {
  interface TimedModel {
    /** At a latitude and longitude in degrees and a height above the ellipsoid in km. */
    point(position: readonly [number, number, number]): {
      /** Degrees, east positive. */ readonly decl: number;
    };
  }
  export default class Model {
    constructor(coefficients: object);
    /** @throws Error where the date is outside the model's own */
    getTimedModel(date: Date): TimedModel;
  }
}
