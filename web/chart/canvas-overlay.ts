import * as L from "leaflet";

/** Draws on a canvas that covers the map, in px from the canvas's own corner. */
export interface OverlayFrame {
  readonly context: CanvasRenderingContext2D;
  readonly map: L.Map;
  readonly width: number;
  readonly height: number;
  /** Where a position falls on the canvas. */
  place(lat: number, lon: number): L.Point;
}

/** A canvas over the map that draws itself anew when the map has moved. */
export class CanvasOverlay extends L.Layer {
  private canvas: HTMLCanvasElement | null = null;
  private readonly draw: (frame: OverlayFrame) => void;
  private readonly following: boolean;
  private readonly paneName: string;

  /** @param following whether it must also draw while the map is being dragged, as labels at the edge do */
  constructor(draw: (frame: OverlayFrame) => void, paneName: string, following: boolean) {
    super({ pane: paneName });
    this.draw = draw;
    this.following = following;
    this.paneName = paneName;
  }

  override onAdd(map: L.Map): this {
    this.canvas = L.DomUtil.create("canvas", "chart-canvas", map.getPane(this.paneName));
    this.canvas.setAttribute("aria-hidden", "true");
    this.redraw();
    return this;
  }

  override onRemove(): this {
    this.canvas?.remove();
    this.canvas = null;
    return this;
  }

  override getEvents(): Record<string, L.LeafletEventHandlerFn> {
    return {
      moveend: () => this.redraw(),
      resize: () => this.redraw(),
      zoomstart: () => this.hide(),
      ...(this.following ? { move: () => this.redraw() } : {}),
    };
  }

  redraw(): void {
    const { canvas, _map: map } = this;
    const context = canvas?.getContext("2d");
    if (!canvas || !context || !map) return;
    const size = map.getSize();
    const scale = window.devicePixelRatio;
    const wanted = { width: Math.round(size.x * scale), height: Math.round(size.y * scale) };
    if (canvas.width !== wanted.width || canvas.height !== wanted.height) Object.assign(canvas, wanted);
    canvas.style.width = `${size.x}px`;
    canvas.style.height = `${size.y}px`;
    canvas.style.visibility = "visible";
    L.DomUtil.setPosition(canvas, map.containerPointToLayerPoint([0, 0]));
    context.setTransform(scale, 0, 0, scale, 0, 0);
    context.clearRect(0, 0, size.x, size.y);
    this.draw({
      context,
      map,
      width: size.x,
      height: size.y,
      place: (lat, lon) => map.latLngToContainerPoint([lat, lon]),
    });
  }

  private hide(): void {
    if (this.canvas) this.canvas.style.visibility = "hidden";
  }
}
