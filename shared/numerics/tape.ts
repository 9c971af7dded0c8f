/**
 * A tape: a flat list of instructions over numbered registers. One loop runs it for one state, and
 * another for blocks of states, where every instruction is a plain loop over neighbouring numbers.
 * Nothing here is made from text, so that it runs under a content security policy without eval.
 */

export const OP = {
  add: 0,
  subtract: 1,
  multiply: 2,
  divide: 3,
  unary: 4,
  binary: 5,
  /** a function of any number of registers. */
  general: 6,
} as const;

type Op = (typeof OP)[keyof typeof OP];

export type Unary = (x: number) => number;
export type Binary = (x: number, y: number) => number;
/** `values` holds the operands in their order, and is only valid during the call. */
export type General = (values: Float64Array) => number;

interface Instruction {
  readonly op: Op;
  readonly a: number;
  readonly b: number;
  readonly unary?: Unary;
  readonly binary?: Binary;
  readonly general?: General;
  readonly operands?: readonly number[];
}

/** States that are computed side by side; all registers of a block should stay in the cache. */
const BLOCK = 128;
/** Fewer states than this are not worth the preparation of blocks. */
const FEWEST_FOR_BLOCKS = 8;

/** Records instructions; what depends on constants alone is computed at once. */
export class TapeBuilder {
  private readonly instructions: Instruction[] = [];
  private readonly targets: number[] = [];
  private readonly initial: number[];
  private readonly constants = new Map<number | string, number>();
  private readonly isConstantRegister: boolean[];
  private readonly known = new Map<string, number>();

  /** The first registers hold the inputs. */
  constructor(inputCount: number) {
    this.initial = Array.from({ length: inputCount }, () => NaN);
    this.isConstantRegister = this.initial.map(() => false);
  }

  /** A further input beside those that were counted at first. */
  input(): number {
    this.isConstantRegister.push(false);
    return this.initial.push(NaN) - 1;
  }

  constant(value: number): number {
    // −0 and 0 differ below a bar, but not as keys.
    const key = Object.is(value, -0) ? '-0' : value;
    const known = this.constants.get(key);
    if (known !== undefined) return known;
    const register = this.initial.push(value) - 1;
    this.isConstantRegister.push(true);
    this.constants.set(key, register);
    return register;
  }

  /** The value of a register that holds a constant, else undefined. */
  constantAt(register: number): number | undefined {
    return this.isConstantRegister[register] ? this.initial[register] : undefined;
  }

  /** An operation on the same registers is recorded once. */
  arithmetic(op: 'add' | 'subtract' | 'multiply' | 'divide', a: number, b: number): number {
    const isSwapped = a > b && (op === 'add' || op === 'multiply');
    const [x, y] = isSwapped ? [b, a] : [a, b];
    const key = `${op} ${x} ${y}`;
    let register = this.known.get(key);
    if (register === undefined) {
      register = this.emit({ op: OP[op], a: x, b: y }, [x, y]);
      this.known.set(key, register);
    }
    return register;
  }

  /** a^n for a whole n ≠ 0 as products, equal squares being shared. */
  power(a: number, n: number): number {
    if (n < 0) return this.arithmetic('divide', this.constant(1), this.power(a, -n));
    let result: number | undefined;
    let square = a;
    for (let rest = n; ;) {
      if (rest & 1) {
        result = result === undefined ? square : this.arithmetic('multiply', result, square);
      }
      rest >>= 1;
      if (rest === 0) return result ?? this.constant(1);
      square = this.arithmetic('multiply', square, square);
    }
  }

  unary(f: Unary, a: number): number {
    return this.emit({ op: OP.unary, a, b: 0, unary: f }, [a]);
  }

  binary(f: Binary, a: number, b: number): number {
    return this.emit({ op: OP.binary, a, b, binary: f }, [a, b]);
  }

  /** `isCostly` keeps sums and integrals from being computed before anybody asks. */
  general(f: General, operands: readonly number[], isCostly = false): number {
    return this.emit({ op: OP.general, a: 0, b: 0, general: f, operands }, operands, isCostly);
  }

  private emit(instruction: Instruction, operands: readonly number[], isCostly = false): number {
    if (!isCostly && operands.every((operand) => this.isConstantRegister[operand])) {
      return this.constant(perform(instruction, Float64Array.from(this.initial)));
    }
    this.instructions.push(instruction);
    this.isConstantRegister.push(false);
    const target = this.initial.push(NaN) - 1;
    this.targets.push(target);
    return target;
  }

  finish(): Tape {
    return new Tape(this.instructions, this.targets, this.initial);
  }
}

function perform(instruction: Instruction, registers: Float64Array): number {
  // Registers are within the array: a fallback for undefined would cost more than the operation.
  const x = registers[instruction.a] as number;
  switch (instruction.op) {
    case OP.add:
      return x + (registers[instruction.b] as number);
    case OP.subtract:
      return x - (registers[instruction.b] as number);
    case OP.multiply:
      return x * (registers[instruction.b] as number);
    case OP.divide:
      return x / (registers[instruction.b] as number);
    case OP.unary:
      return instruction.unary?.(x) ?? NaN;
    case OP.binary:
      return instruction.binary?.(x, registers[instruction.b] as number) ?? NaN;
    case OP.general: {
      const { operands = [] } = instruction;
      const values = new Float64Array(operands.length);
      for (let i = 0; i < operands.length; i++) {
        values[i] = registers[operands[i] as number] as number;
      }
      return instruction.general?.(values) ?? NaN;
    }
  }
}

export class Tape {
  /** One value each: inputs first, then constants and results as they came up. */
  readonly registers: Float64Array;
  private readonly instructions: readonly Instruction[];
  private readonly targets: readonly number[];
  private readonly initial: readonly number[];
  private blocks: Float64Array | undefined;

  constructor(
    instructions: readonly Instruction[],
    targets: readonly number[],
    initial: readonly number[],
  ) {
    this.instructions = instructions;
    this.targets = targets;
    this.initial = initial;
    this.registers = Float64Array.from(initial);
  }

  get length(): number {
    return this.instructions.length;
  }

  /** Computes all registers from the inputs that `registers` holds. */
  run(): void {
    const { instructions, targets, registers } = this;
    for (let i = 0; i < instructions.length; i++) {
      const instruction = instructions[i];
      const target = targets[i];
      if (instruction && target !== undefined) {
        registers[target] = perform(instruction, registers);
      }
    }
  }

  /**
   * Computes outputs for `count` states: `columns[i]` holds the values of input i, one of length 1
   * standing for all states. What depends on such columns alone is computed once.
   */
  runColumns(
    inputs: readonly number[],
    columns: readonly ArrayLike<number>[],
    outputs: readonly number[],
    results: readonly Float64Array[],
    count: number,
  ): void {
    const { registers } = this;
    const varies = new Uint8Array(this.initial.length);
    inputs.forEach((register, i) => {
      const column = columns[i];
      registers[register] = column?.[0] ?? NaN;
      if (column && column.length > 1) varies[register] = 1;
    });
    const varying = this.markVarying(varies);
    this.run();
    if (count < FEWEST_FOR_BLOCKS) {
      for (let row = 0; row < count; row++) {
        if (row > 0) {
          inputs.forEach((register, i) => {
            if (varies[register]) registers[register] = columns[i]?.[row] ?? NaN;
          });
          this.run();
        }
        outputs.forEach((register, j) => {
          const result = results[j];
          if (result) result[row] = registers[register] ?? NaN;
        });
      }
      return;
    }

    const blocks = (this.blocks ??= new Float64Array(this.initial.length * BLOCK));
    for (let register = 0; register < varies.length; register++) {
      if (!varies[register]) {
        blocks.fill(registers[register] ?? NaN, register * BLOCK, (register + 1) * BLOCK);
      }
    }
    for (let start = 0; start < count; start += BLOCK) {
      const size = Math.min(BLOCK, count - start);
      inputs.forEach((register, i) => {
        const column = columns[i];
        if (!column || !varies[register]) return;
        const offset = register * BLOCK;
        for (let s = 0; s < size; s++) blocks[offset + s] = column[start + s] ?? NaN;
      });
      for (const i of varying) {
        const instruction = this.instructions[i];
        const target = this.targets[i];
        if (instruction && target !== undefined) performBlock(instruction, target, blocks, size);
      }
      outputs.forEach((register, j) => {
        const offset = register * BLOCK;
        results[j]?.set(blocks.subarray(offset, offset + size), start);
      });
    }
  }

  /** Marks what depends on a varying input and returns the instructions that compute it. */
  private markVarying(varies: Uint8Array): number[] {
    const varying: number[] = [];
    this.instructions.forEach((instruction, i) => {
      const { op, a, b, operands } = instruction;
      const isVarying = operands
        ? operands.some((operand) => varies[operand])
        : varies[a] || (op !== OP.unary && varies[b]);
      if (!isVarying) return;
      varies[this.targets[i] ?? 0] = 1;
      varying.push(i);
    });
    return varying;
  }
}

function performBlock(
  instruction: Instruction,
  target: number,
  blocks: Float64Array,
  size: number,
): void {
  const { op, unary, binary, general, operands } = instruction;
  const to = target * BLOCK;
  const x = instruction.a * BLOCK;
  const y = instruction.b * BLOCK;
  // The offsets are within the array, so that the casts below are true; a fallback for undefined
  // would double the time of these loops.
  switch (op) {
    case OP.add:
      for (let s = 0; s < size; s++) {
        blocks[to + s] = (blocks[x + s] as number) + (blocks[y + s] as number);
      }
      break;
    case OP.subtract:
      for (let s = 0; s < size; s++) {
        blocks[to + s] = (blocks[x + s] as number) - (blocks[y + s] as number);
      }
      break;
    case OP.multiply:
      for (let s = 0; s < size; s++) {
        blocks[to + s] = (blocks[x + s] as number) * (blocks[y + s] as number);
      }
      break;
    case OP.divide:
      for (let s = 0; s < size; s++) {
        blocks[to + s] = (blocks[x + s] as number) / (blocks[y + s] as number);
      }
      break;
    case OP.unary:
      if (unary) for (let s = 0; s < size; s++) blocks[to + s] = unary(blocks[x + s] as number);
      break;
    case OP.binary:
      if (!binary) break;
      for (let s = 0; s < size; s++) {
        blocks[to + s] = binary(blocks[x + s] as number, blocks[y + s] as number);
      }
      break;
    case OP.general: {
      if (!general || !operands) break;
      const values = new Float64Array(operands.length);
      for (let s = 0; s < size; s++) {
        for (let i = 0; i < operands.length; i++) {
          values[i] = blocks[(operands[i] as number) * BLOCK + s] as number;
        }
        blocks[to + s] = general(values);
      }
      break;
    }
  }
}
