/** The true shape in three: builds the solids, the axes and the light, looks at them, and gives everything back when closed. */
import {
  AmbientLight, ArrowHelper, Box3, CanvasTexture, Color, DirectionalLight, Group, Material, Mesh, MeshLambertMaterial, PerspectiveCamera, Scene, Sphere, Spherical, Sprite, SpriteMaterial, Vector3, WebGLRenderer,
} from "three";
import { OrbitControls } from "three/examples/jsm/controls/OrbitControls.js";
import { solidGeometry } from "./shape-solids";
import type { ShapePart, Tint } from "./shape-parts";

const FIELD_DEG = 35;
const TINTS: Readonly<Record<Tint, string>> = { pipe: "#a39c8b", fitting: "#7d7565", flange: "#5f5a4f", valve: "#8a6b2d" };
const ACTIVE = "#1b3f94";
const PAPER = "#fffdf8";
/** First look: from the south-west and above, as the first view of the isometric. */
const FIRST_LOOK = new Vector3(-1, -1, 0.8);
const TURN_STEP_RAD = Math.PI / 18;
const CLOSER = 0.85;

export class ShapeScene {
  private readonly renderer: WebGLRenderer;
  private readonly scene = new Scene();
  private readonly camera = new PerspectiveCamera(FIELD_DEG, 1, 0.01, 2_000);
  private readonly controls: OrbitControls;
  private readonly shape = new Group();
  private readonly axes = new Group();
  private readonly materials = new Map<string, MeshLambertMaterial>();
  private fitted = false;

  /** @throws when the browser gives no WebGL. */
  constructor(canvas: HTMLCanvasElement) {
    this.renderer = new WebGLRenderer({ canvas, antialias: true });
    this.scene.background = new Color(PAPER);
    this.camera.up.set(0, 0, 1);
    this.controls = new OrbitControls(this.camera, canvas);
    this.controls.addEventListener("change", this.paint);
    const sun = new DirectionalLight("#ffffff", 2.2);
    sun.position.set(-2, -3, 5);
    this.scene.add(new AmbientLight("#ffffff", 1.6), sun, this.shape, this.axes);
  }

  /** Shows these solids; the look stays where it was, except the first time. */
  show(parts: readonly ShapePart[], activePointId: string | null): void {
    emptied(this.shape);
    for (const part of parts) this.shape.add(new Mesh(solidGeometry(part), this.material(part.pointId === activePointId ? ACTIVE : TINTS[part.tint])));
    this.drawAxes();
    if (!this.fitted && parts.length > 0) this.fit();
    this.paint();
  }

  private material(colour: string): MeshLambertMaterial {
    const made = this.materials.get(colour) ?? new MeshLambertMaterial({ color: colour });
    this.materials.set(colour, made);
    return made;
  }

  private bounds(): Sphere {
    const sphere = new Sphere(new Vector3(), 1);
    if (this.shape.children.length > 0) new Box3().setFromObject(this.shape).getBoundingSphere(sphere);
    return sphere;
  }

  /** East, north and up at the low corner, named; north in the active colour. */
  private drawAxes(): void {
    emptied(this.axes);
    if (this.shape.children.length === 0) return;
    const box = new Box3().setFromObject(this.shape);
    const length = Math.max(0.3, this.bounds().radius * 0.35);
    const named = [["E", new Vector3(1, 0, 0), "#57524a"], ["N", new Vector3(0, 1, 0), ACTIVE], ["UP", new Vector3(0, 0, 1), "#57524a"]] as const;
    for (const [name, way, colour] of named) {
      this.axes.add(new ArrowHelper(way, box.min, length, colour, length * 0.16, length * 0.07));
      const label = nameSprite(name, colour, length * 0.3);
      label.position.copy(box.min).addScaledVector(way, length * 1.18);
      this.axes.add(label);
    }
  }

  /** Shows all of it. */
  fit(): void {
    const { center, radius } = this.bounds();
    const away = (radius * 1.15) / Math.sin((Math.min(FIELD_DEG, FIELD_DEG * this.camera.aspect) * Math.PI) / 360);
    const look = this.fitted ? this.camera.position.clone().sub(this.controls.target) : FIRST_LOOK.clone();
    this.fitted = true;
    this.camera.position.copy(center).addScaledVector(look.normalize(), away);
    this.camera.near = Math.max(0.005, away / 500);
    this.camera.far = away * 20;
    this.camera.updateProjectionMatrix();
    this.controls.target.copy(center);
    this.controls.update();
    this.paint();
  }

  /** Turns the look about what it looks at, in steps. */
  turn(sideways: number, upwards: number): void {
    const look = this.camera.position.clone().sub(this.controls.target);
    const round = new Spherical().setFromVector3(new Vector3(look.x, look.z, -look.y));
    round.theta += sideways * TURN_STEP_RAD;
    round.phi = Math.max(0.05, Math.min(Math.PI - 0.05, round.phi - upwards * TURN_STEP_RAD));
    const next = new Vector3().setFromSpherical(round);
    this.camera.position.copy(this.controls.target).add(new Vector3(next.x, -next.z, next.y));
    this.controls.update();
    this.paint();
  }

  /** 1 looks closer, -1 wider. */
  zoom(step: 1 | -1): void {
    const look = this.camera.position.clone().sub(this.controls.target);
    this.camera.position.copy(this.controls.target).addScaledVector(look, step > 0 ? CLOSER : 1 / CLOSER);
    this.controls.update();
    this.paint();
  }

  resize(width: number, height: number, pixelRatio: number): void {
    this.renderer.setPixelRatio(Math.min(2, pixelRatio));
    this.renderer.setSize(width, height, false);
    this.camera.aspect = width / Math.max(1, height);
    this.camera.updateProjectionMatrix();
    this.paint();
  }

  private readonly paint = (): void => this.renderer.render(this.scene, this.camera);

  /** Gives back every buffer, texture and the context itself. */
  close(): void {
    this.controls.removeEventListener("change", this.paint);
    this.controls.dispose();
    emptied(this.shape);
    emptied(this.axes);
    this.materials.forEach((material) => material.dispose());
    this.materials.clear();
    this.renderer.dispose();
    this.renderer.forceContextLoss();
  }
}

const LETTER_PX = 128;

function nameSprite(name: string, colour: string, height: number): Sprite {
  const canvas = document.createElement("canvas");
  canvas.width = LETTER_PX * 2;
  canvas.height = LETTER_PX;
  const pen = canvas.getContext("2d");
  if (pen) {
    pen.font = `700 ${LETTER_PX * 0.8}px Roboto, sans-serif`;
    pen.textAlign = "center";
    pen.textBaseline = "middle";
    pen.fillStyle = colour;
    pen.fillText(name, LETTER_PX, LETTER_PX / 2);
  }
  const sprite = new Sprite(new SpriteMaterial({ map: new CanvasTexture(canvas), transparent: true, depthTest: false }));
  sprite.scale.set(height * 2, height, 1);
  return sprite;
}

/** Takes everything out of a group and gives its buffers back; shared materials stay. */
function emptied(group: Group): void {
  group.traverse((each) => {
    if (each instanceof Mesh || "geometry" in each) (each as Mesh).geometry?.dispose();
    if (each instanceof Sprite) each.material.map?.dispose();
    const own = each instanceof Sprite || each.parent instanceof ArrowHelper ? (each as Sprite).material : null;
    if (own instanceof Material) own.dispose();
  });
  group.clear();
}
