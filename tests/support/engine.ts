/**
 * A corner as a mechanism in a general physics engine (MuJoCo's WebAssembly build, double precision): hinged arms, an
 * upright on a ball joint, a tie rod on two hinges carried by a sliding rack, and two "connect" constraints. Its own
 * constraint residuals and Jacobian are closed by Newton steps; nothing is stepped in time, since its constraints are soft.
 */
import loadMujoco from '@mujoco/mujoco';
import { add, cross, diskUp, scale, spinAxis, sub, unit, VERTICAL, type Corner, type V3 } from './newton';

type Engine = Awaited<ReturnType<typeof loadMujoco>>;

/** What is read off the engine, body axes, mm. */
export interface EnginePose {
	lowerBall: V3;
	upperBall: V3;
	wheelCentre: V3;
	spin: V3;
	/** Largest residual of any constraint, mm. */
	gap: number;
}

const text = (v: V3): string => v.map((x) => String(x)).join(' ');
const INERTIA = '<inertial pos="0 0 0" mass="1" diaginertia="1 1 1"/>';

function hubOf(corner: Corner): V3 {
	const up = diskUp(spinAxis(corner.wheel, 1), VERTICAL);
	return add([corner.wheel.x, corner.wheel.track / 2, 0], scale(up, corner.wheel.loadedRadius));
}

/** The mechanism of a left corner; every frame is parallel to the body's at ride height. */
function describe(corner: Corner): string {
	const p = corner.points;
	const rod = unit(sub(p.tieRodOuter, p.tieRodInner));
	const swing = unit(cross(rod, [1, 0, 0]));
	const lift = cross(rod, swing);
	const spin = spinAxis(corner.wheel, 1);
	return `<mujoco><compiler angle="radian"/><option gravity="0 0 0" jacobian="dense"/><worldbody>
<body pos="${text(p.lowerFront)}"><joint type="hinge" axis="${text(unit(sub(p.lowerFront, p.lowerRear)))}"/>${INERTIA}
 <body pos="${text(sub(p.lowerBall, p.lowerFront))}"><joint type="ball"/>${INERTIA}
  <site name="lowerBall"/><site name="upperBall" pos="${text(sub(p.upperBall, p.lowerBall))}"/>
  <site name="steeringArm" pos="${text(sub(p.tieRodOuter, p.lowerBall))}"/>
  <site name="hub" pos="${text(sub(hubOf(corner), p.lowerBall))}"/>
  <site name="spinTip" pos="${text(add(sub(hubOf(corner), p.lowerBall), scale(spin, 1000)))}"/>
 </body></body>
<body pos="${text(p.upperFront)}"><joint type="hinge" axis="${text(unit(sub(p.upperFront, p.upperRear)))}"/>${INERTIA}
 <site name="armEnd" pos="${text(sub(p.upperBall, p.upperFront))}"/></body>
<body pos="${text(p.tieRodInner)}"><joint type="slide" axis="0 1 0"/>${INERTIA}
 <body><joint type="hinge" axis="${text(swing)}"/><joint type="hinge" axis="${text(lift)}"/>${INERTIA}
  <site name="rodEnd" pos="${text(sub(p.tieRodOuter, p.tieRodInner))}"/></body></body>
</worldbody><equality><connect site1="upperBall" site2="armEnd"/><connect site1="steeringArm" site2="rodEnd"/></equality></mujoco>`;
}

// Sites and freedoms in the order of the description above.
const SITE = { lowerBall: 0, upperBall: 1, hub: 3, spinTip: 4 } as const;
const RACK = { position: 6, freedom: 5 } as const;

/** Gaussian elimination of a square system with row exchange. */
function linear(rows: number[][]): number[] {
	const n = rows.length;
	const get = (r: number, c: number): number => rows[r]?.[c] ?? NaN;
	for (let c = 0; c < n; c++) {
		let best = c;
		for (let r = c + 1; r < n; r++) if (Math.abs(get(r, c)) > Math.abs(get(best, c))) best = r;
		[rows[c], rows[best]] = [rows[best] ?? [], rows[c] ?? []];
		for (let r = 0; r < n; r++) {
			const f = r === c ? 0 : get(r, c) / get(c, c);
			if (f !== 0) rows[r] = (rows[r] ?? []).map((x, k) => x - f * get(c, k));
		}
	}
	return rows.map((row, r) => (row[n] ?? NaN) / (row[r] ?? NaN));
}

/** One mechanism in the engine; `close()` frees what it holds there. */
export class EngineCorner {
	private readonly model;
	private readonly data;
	private readonly jacobian;
	private readonly hubHeight: number;

	private constructor(
		private readonly engine: Engine,
		corner: Corner
	) {
		this.model = engine.MjModel.from_xml_string(describe(corner));
		this.data = new engine.MjData(this.model);
		this.jacobian = new engine.DoubleBuffer(3 * this.model.nv);
		this.hubHeight = hubOf(corner)[2];
	}

	static async open(corner: Corner): Promise<EngineCorner> {
		return new EngineCorner(await loadMujoco(), corner);
	}

	close(): void {
		this.jacobian.delete();
		this.data.delete();
		this.model.delete();
	}

	/** The joints' present values, to come back to. */
	get joints(): Float64Array {
		return Float64Array.from(this.data.qpos as Float64Array);
	}

	set joints(values: Float64Array) {
		(this.data.qpos as Float64Array).set(values);
	}

	/** Closes the mechanism at a travel and rack (mm), from where its joints stand. Throws when it does not close. */
	assemble(travel: number, rack: number): EnginePose {
		const { engine, model, data } = this;
		for (let i = 0; i < 30; i++) {
			engine.mj_fwdPosition(model, data);
			const size = this.step(travel, rack);
			if (size < 1e-10) {
				engine.mj_fwdPosition(model, data);
				return this.read();
			}
		}
		throw new Error(`The engine's mechanism does not close at ${travel} mm of travel and ${rack} mm of rack.`);
	}

	/** One Newton step on the engine's own residuals, the wheel centre's height and the rack; gives its size. */
	private step(travel: number, rack: number): number {
		const { engine, model, data } = this;
		const nv = model.nv;
		const residual = data.efc_pos as Float64Array;
		const slopes = data.efc_J as Float64Array;
		const rows = Array.from({ length: data.nefc }, (_, r) => [
			...slopes.slice(r * nv, (r + 1) * nv),
			-(residual[r] ?? NaN)
		]);
		engine.mj_jacSite(model, data, this.jacobian, null, SITE.hub);
		const hubSlope = (this.jacobian.GetView() as Float64Array).slice(2 * nv, 3 * nv);
		rows.push([...hubSlope, this.hubHeight + travel - this.site(SITE.hub)[2]]);
		const position = data.qpos as Float64Array;
		rows.push([
			...Array.from({ length: nv }, (_, k) => (k === RACK.freedom ? 1 : 0)),
			rack - (position[RACK.position] ?? NaN)
		]);
		const step = linear(rows);
		engine.mj_integratePos(model, data.qpos, step, 1);
		return Math.max(...step.map((s, k) => Math.abs(s) * (k === RACK.freedom ? 1 : 300)));
	}

	private site(index: number): V3 {
		const places = data64(this.data.site_xpos);
		return [places[3 * index] ?? NaN, places[3 * index + 1] ?? NaN, places[3 * index + 2] ?? NaN];
	}

	private read(): EnginePose {
		const wheelCentre = this.site(SITE.hub);
		return {
			lowerBall: this.site(SITE.lowerBall),
			upperBall: this.site(SITE.upperBall),
			wheelCentre,
			spin: unit(sub(this.site(SITE.spinTip), wheelCentre)),
			gap: Math.max(...Array.from(data64(this.data.efc_pos), (x) => Math.abs(x)))
		};
	}
}

const data64 = (view: unknown): Float64Array => view as Float64Array;
