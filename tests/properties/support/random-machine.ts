import type { StudyDraft } from './study-draft';
import type { MachineModel, SecondOrderModel } from './study-model';
import {
  constant,
  divided,
  minus,
  negative,
  ONE,
  plus,
  scaled,
  squared,
  type Term,
  times,
  ZERO,
} from './term';

/** A machine made up at random, with what a controller's gains are measured by. */
export interface RandomMachine {
  readonly machine: MachineModel;
  /** A natural frequency, rad/s. */
  readonly frequency: number;
  /** Static stiffness between input and output, about. */
  readonly stiffness: number;
  /** Whether the gains have to be placed, since the machine is unstable by itself. */
  readonly needsFeedback: boolean;
}

export type MachineFamily = (draft: StudyDraft) => RandomMachine;

const square = (n: number): Term[][] => Array.from({ length: n }, () => new Array<Term>(n).fill(ZERO));

const unitRow = (n: number, index: number): Term[] =>
  Array.from({ length: n }, (_, i) => (i === index ? ONE : ZERO));

function couple(matrix: Term[][], i: number, j: number, term: Term): void {
  matrix[i][i] = plus(matrix[i][i], term);
  if (j < 0) return;
  matrix[j][j] = plus(matrix[j][j], term);
  matrix[i][j] = plus(matrix[i][j], negative(term));
  matrix[j][i] = plus(matrix[j][i], negative(term));
}

/** Masses in a row with springs and dampers between them; the payload may enter springs and dampers too. */
export const chain: MachineFamily = (draft) => {
  const { random } = draft;
  const n = random.integer(1, 3);
  const size = random.decade(0, 2.5);
  const frequency = random.decade(-0.3, 1.7);
  const damping = random.chance(0.3) ? random.decade(-3, -1.7) : random.decade(-1.7, -0.2);
  const payload = draft.payloadQuantity(size * random.decade(-0.7, 0.7));
  const loaded = random.integer(0, n - 1);
  const [mass, dampers, springs] = [square(n), square(n), square(n)];
  for (let i = 0; i < n; i++) {
    const own = draft.quantity(`M${i}`, size * random.decade(-0.5, 0.5));
    mass[i][i] = i === loaded && random.chance(0.9) ? plus(own, payload) : own;
  }
  if (random.chance(0.1)) mass[loaded][loaded] = payload;
  for (let i = 0; i < n; i++) {
    const nominal = size * frequency * frequency * random.decade(-0.3, 0.6);
    let spring = draft.quantity(`k${i}`, nominal);
    const added = random.next();
    if (added < 0.12) spring = plus(spring, scaled((random.sign() * nominal) / size / 20, payload));
    else if (added < 0.18) spring = divided(scaled(size, spring), plus(constant(size), payload));
    else if (added < 0.24) spring = times(spring, minus(ONE, scaled(0.02 / size, payload)));
    let damper = draft.quantity(`c${i}`, 2 * damping * size * frequency * random.decade(-0.3, 0.3));
    if (random.chance(0.12)) damper = times(damper, plus(ONE, scaled(0.3 / size, payload)));
    const to = i === 0 ? (random.chance(0.7) ? -1 : -2) : i - 1;
    if (to === -2) continue;
    couple(springs, i, to, draft.named(`spring${i}`, spring));
    couple(dampers, i, to, damper);
  }
  if (random.chance(0.3)) couple(dampers, 0, -1, draft.quantity('b', 2 * damping * size * frequency));
  const drive = random.integer(0, n - 1);
  const sensor = random.chance(0.7) ? drive : random.integer(0, n - 1);
  const machine: SecondOrderModel = {
    order: 2,
    names: Array.from({ length: n }, (_, i) => `q${i}`),
    mass,
    damping: dampers,
    stiffness: springs,
    inputs: { u: unitRow(n, drive), w: unitRow(n, n - 1) },
    outputs: {
      y: random.chance(0.85) ? { position: unitRow(n, sensor) } : { velocity: unitRow(n, sensor) },
      z: { position: unitRow(n, n - 1) },
    },
  };
  return { machine, frequency, stiffness: size * frequency * frequency, needsFeedback: false };
};

/** The same row of masses in first order, with a descriptor that carries the masses or divided by them. */
export const firstOrderChain: MachineFamily = (draft) => {
  const made = chain(draft);
  const { machine } = made;
  if (machine.order === 1) return made;
  const n = machine.names.length;
  const divides = draft.random.chance(0.5);
  const dynamics = square(2 * n);
  const descriptor = square(2 * n);
  for (let i = 0; i < n; i++) {
    dynamics[i][n + i] = ONE;
    descriptor[i][i] = ONE;
    descriptor[n + i][n + i] = machine.mass[i][i];
    const over = (term: Term): Term => (divides && term !== ZERO ? divided(term, machine.mass[i][i]) : term);
    for (let j = 0; j < n; j++) {
      dynamics[n + i][j] = over(negative(machine.stiffness[i][j]));
      dynamics[n + i][n + j] = over(negative(machine.damping[i][j]));
    }
  }
  const input = (terms: Term[]): Term[] => [
    ...new Array<Term>(n).fill(ZERO),
    ...terms.map((term, i) => (divides && term !== ZERO ? divided(term, machine.mass[i][i]) : term)),
  ];
  const names = Array.from({ length: 2 * n }, (_, i) => `x${i}`);
  const { u, w } = machine.inputs;
  const output = ({ position, velocity }: { position?: Term[]; velocity?: Term[] }): Term[] => [
    ...(position ?? new Array<Term>(n).fill(ZERO)),
    ...(velocity ?? new Array<Term>(n).fill(ZERO)),
  ];
  return {
    ...made,
    machine: {
      order: 1,
      names,
      ...(divides ? {} : { descriptor }),
      dynamics,
      inputs: { u: input(u), w: input(w) },
      outputs: { y: output(machine.outputs.y), z: output(machine.outputs.z) },
    },
  };
};

/** A body balanced above its support: unstable by itself, mass matrix coupled by payload times height. */
export const balanced: MachineFamily = (draft) => {
  const { random } = draft;
  const size = random.decade(0.5, 2);
  const payload = draft.payloadQuantity(size);
  const height = draft.quantity('h', random.between(0.4, 1.4));
  const base = draft.quantity('Mb', size * random.decade(-0.7, 0.5));
  const inertia = draft.quantity('J', size * random.decade(-1.5, 0));
  const friction = draft.quantity('b', size * random.decade(-2, 0.3));
  const moment = draft.named('moment', times(payload, height));
  const machine: SecondOrderModel = {
    order: 2,
    names: ['x', 'theta'],
    mass: [
      [plus(base, payload), moment],
      [moment, plus(inertia, times(payload, squared(height)))],
    ],
    damping: [
      [friction, ZERO],
      [ZERO, draft.quantity('bt', size * random.decade(-3, -0.5))],
    ],
    stiffness: [
      [ZERO, ZERO],
      [ZERO, negative(scaled(9.80665, moment))],
    ],
    inputs: {
      u: [ONE, random.chance(0.5) ? ZERO : negative(constant(random.between(0.1, 0.5)))],
      w: [ZERO, ONE],
    },
    outputs: { y: { position: [ONE, ZERO] }, z: { position: [ZERO, ONE] } },
  };
  return { machine, frequency: 3.5, stiffness: size * 12, needsFeedback: true };
};

/** Full matrices, a stiffness that is not symmetric: two modes that can meet and flutter. */
export const flutter: MachineFamily = (draft) => {
  const { random } = draft;
  const n = random.integer(2, 3);
  const size = random.decade(0, 2);
  const frequency = random.decade(0, 1.5);
  const unit = size * frequency * frequency;
  const payload = draft.payloadQuantity(size * random.decade(-1, 0.3));
  const arm = Array.from({ length: n }, () => random.between(-1, 1));
  const [mass, damping, stiffness] = [square(n), square(n), square(n)];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const own = i === j ? constant(size * random.between(0.8, 2)) : ZERO;
      mass[i][j] = plus(own, scaled(arm[i] * arm[j], payload));
      if (i === j) {
        damping[i][i] = draft.quantity(`c${i}`, size * frequency * random.decade(-2, -0.3));
        stiffness[i][i] = draft.quantity(`k${i}`, unit * random.decade(-0.3, 0.5));
      } else if (random.chance(0.7)) {
        stiffness[i][j] = scaled(
          random.sign(),
          draft.quantity(`s${i}${j}`, unit * random.decade(-1.5, -0.3)),
        );
        if (random.chance(0.3))
          stiffness[i][j] = times(stiffness[i][j], plus(ONE, scaled(0.5 / size, payload)));
        if (random.chance(0.3))
          damping[i][j] = constant(random.sign() * size * frequency * random.decade(-2.5, -1));
      }
    }
  }
  const machine: SecondOrderModel = {
    order: 2,
    names: Array.from({ length: n }, (_, i) => `q${i}`),
    mass,
    damping,
    stiffness,
    inputs: { u: unitRow(n, 0), w: unitRow(n, n - 1) },
    outputs: { y: { position: unitRow(n, random.integer(0, n - 1)) }, z: { velocity: unitRow(n, n - 1) } },
  };
  return { machine, frequency, stiffness: unit, needsFeedback: false };
};

/** Full first-order dynamics with entries that are rational in the parameters. */
export const general: MachineFamily = (draft) => {
  const { random } = draft;
  const n = random.integer(3, 5);
  const rate = random.decade(-0.3, 1.3);
  const payload = draft.payloadQuantity(random.decade(-1, 2));
  const unit = draft.parameters[0].nominal;
  const dynamics = square(n);
  const load = divided(payload, constant(unit));
  const loaded = random.integer(0, n - 1);
  let named = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      if (i !== j && random.chance(0.35)) continue;
      const value = i === j ? -rate * random.decade(-0.7, 0.7) : rate * random.between(-1.5, 1.5);
      let term = named < 5 && random.chance(0.3) ? draft.quantity(`a${named++}`, value) : constant(value);
      const part = random.next();
      if (i === loaded && part < 0.3) term = divided(term, plus(constant(0.5), load));
      else if (part < 0.08) term = times(term, plus(constant(0.7), scaled(0.3, load)));
      else if (part < 0.12) term = times(term, squared(load));
      dynamics[i][j] = term;
    }
  }
  let descriptor: Term[][] | undefined;
  if (random.chance(0.6)) {
    descriptor = square(n);
    for (let i = 0; i < n; i++) descriptor[i][i] = ONE;
    const j = random.integer(0, n - 1);
    descriptor[loaded][loaded] = plus(constant(0.3), scaled(0.7, load));
    if (j !== loaded) descriptor[loaded][j] = scaled(random.between(-0.3, 0.3), load);
  }
  const input = Array.from({ length: n }, () =>
    random.chance(0.5) ? constant(random.between(-1, 1)) : ZERO,
  );
  input[random.integer(0, n - 1)] = random.chance(0.3) ? divided(ONE, plus(constant(0.5), load)) : ONE;
  return {
    machine: {
      order: 1,
      names: Array.from({ length: n }, (_, i) => `x${i}`),
      ...(descriptor && { descriptor }),
      dynamics,
      inputs: { u: input, w: unitRow(n, random.integer(0, n - 1)) },
      outputs: { y: unitRow(n, random.integer(0, n - 1)), z: unitRow(n, random.integer(0, n - 1)) },
    },
    frequency: rate,
    stiffness: rate,
    needsFeedback: random.chance(0.4),
  };
};

/** Damping that turns negative in a pocket of the payload, or on an island in payload and stiffness. */
export const pocket: MachineFamily = (draft) => {
  const { random } = draft;
  const n = random.integer(1, 2);
  const size = random.decade(0, 2.5);
  const frequency = random.decade(0, 1.5);
  const payload = draft.payloadQuantity(size);
  const spring = draft.quantity('k', 2 * size * frequency * frequency);
  const nominal = draft.parameters[0].nominal;
  const stiff = draft.parameters[1].nominal;
  const distance = (term: Term, centre: number, width: number): Term =>
    squared(divided(minus(term, constant(centre)), constant(width)));
  const centre = nominal * (random.chance(0.75) ? random.between(1.1, 3) : random.between(0.2, 0.9));
  const across = distance(payload, centre, nominal * random.decade(-0.7, 0.3));
  const island = random.chance(0.6);
  const bowl = island
    ? plus(across, distance(spring, stiff * random.between(0.85, 1.15), stiff * 0.3))
    : across;
  const radius = random.chance(0.1) ? 0 : random.chance(0.4) ? random.decade(-8, -3) : random.decade(-3, -1);
  const damper = scaled(2 * size * frequency * random.decade(-1.5, 0), minus(bowl, constant(radius)));
  const [mass, damping, stiffness] = [square(n), square(n), square(n)];
  const light = draft.quantity('m0', size * random.decade(-1, 0));
  mass[0][0] = plus(light, payload);
  couple(stiffness, 0, -1, spring);
  couple(damping, 0, -1, damper);
  if (n === 2) {
    mass[1][1] = draft.quantity('M1', size * random.decade(-0.5, 0.5));
    stiffness[1][1] = draft.quantity('k1', size * frequency * frequency * random.decade(-0.5, 0.5));
    damping[1][1] = draft.quantity('c1', size * frequency * random.decade(-1, 0));
    if (random.chance(0.6)) {
      const link = constant(size * frequency * frequency * random.decade(-2, -0.5));
      couple(stiffness, 0, 1, link);
    }
  }
  const machine: SecondOrderModel = {
    order: 2,
    names: Array.from({ length: n }, (_, i) => `q${i}`),
    mass,
    damping,
    stiffness,
    inputs: { u: unitRow(n, n - 1), w: unitRow(n, 0) },
    outputs: { y: { position: unitRow(n, n - 1) }, z: { velocity: unitRow(n, 0) } },
  };
  return { machine, frequency, stiffness: size * frequency * frequency, needsFeedback: false };
};

/** Sideways motion of a vehicle at a speed: rational in the speed, mass and inertia grow with the payload. */
export const lateral: MachineFamily = (draft) => {
  const { random } = draft;
  const payload = draft.payloadQuantity(random.between(100, 900));
  const mass = draft.named('mass', plus(draft.quantity('m0', random.between(900, 2000)), payload));
  const speed = draft.quantity('V', random.between(8, 40));
  const front = draft.quantity('cf', random.between(50e3, 120e3));
  const rear = draft.quantity('cr', random.between(50e3, 140e3));
  const lf = random.between(1, 1.5);
  const lr = random.between(1.1, 1.7);
  const arm = random.between(0.2, 1.2);
  const inertia = plus(constant(random.between(1500, 3000)), scaled(arm * arm, payload));
  const moment = minus(scaled(lr, rear), scaled(lf, front));
  const over = (term: Term): Term => divided(term, speed);
  return {
    machine: {
      order: 1,
      names: ['vy', 'r', 'psi', 'y'],
      descriptor: [
        [mass, scaled(-0.1 * arm, payload), ZERO, ZERO],
        [scaled(-0.1 * arm, payload), inertia, ZERO, ZERO],
        [ZERO, ZERO, ONE, ZERO],
        [ZERO, ZERO, ZERO, ONE],
      ],
      dynamics: [
        [negative(over(plus(front, rear))), minus(over(moment), times(mass, speed)), ZERO, ZERO],
        [over(moment), negative(over(plus(scaled(lf * lf, front), scaled(lr * lr, rear)))), ZERO, ZERO],
        [ZERO, ONE, ZERO, ZERO],
        [ONE, ZERO, speed, ZERO],
      ],
      inputs: { u: [front, scaled(lf, front), ZERO, ZERO], w: [ONE, ZERO, ZERO, ZERO] },
      outputs: { y: [ZERO, ZERO, ONE, constant(0.05)], z: [ZERO, ONE, ZERO, ZERO] },
    },
    frequency: 4,
    stiffness: 1,
    needsFeedback: true,
  };
};
