import {
  CellError,
  ErrorType,
  FunctionArgumentType,
  FunctionPlugin,
  type ImplementedFunctions,
} from 'hyperformula'
import { limits } from '../limits'
import { ceilingDecimal, floorDecimal, roundDecimal, tidy } from './rounding'
import { joinBounded } from './text-bounds'

type Interpreter = ConstructorParameters<typeof FunctionPlugin>[0]
type Ast = Parameters<Interpreter['evaluateAst']>[0]
type State = Parameters<Interpreter['evaluateAst']>[1]
type Value = ReturnType<Interpreter['evaluateAst']>
type Call = Extract<Ast, { procedureName: string }>

const number = { argumentType: FunctionArgumentType.NUMBER }
const numberOrZero = { argumentType: FunctionArgumentType.NUMBER, defaultValue: 0 }

/**
 * Functions registered under built-in names because the built-in ones round the binary value (E1), cut INT towards zero (E2),
 * or make texts of any length (E3); and `ONE_VALUE`, which the engine puts around formulas that could give many (E4).
 */
export class DecimalFunctions extends FunctionPlugin {
  static override implementedFunctions: ImplementedFunctions = {
    ROUND: { method: 'round', parameters: [number, numberOrZero] },
    ROUNDUP: { method: 'roundUp', parameters: [number, numberOrZero] },
    ROUNDDOWN: { method: 'roundDown', parameters: [number, numberOrZero] },
    TRUNC: { method: 'truncate', parameters: [number, numberOrZero] },
    INT: { method: 'integer', parameters: [number] },
    CEILING: { method: 'ceiling', parameters: [number, { ...number, defaultValue: 1 }] },
    FLOOR: { method: 'floor', parameters: [number, { ...number, defaultValue: 1 }] },
    MROUND: { method: 'multiple', parameters: [number, number] },
    QUOTIENT: { method: 'quotient', parameters: [number, number] },
    MOD: { method: 'modulo', parameters: [number, number] },
    REPT: {
      method: 'repeat',
      parameters: [{ argumentType: FunctionArgumentType.STRING }, number],
    },
    ONE_VALUE: { method: 'oneValue', parameters: [{ argumentType: FunctionArgumentType.RANGE }] },
  }

  constructor(interpreter: Interpreter) {
    super(interpreter)
    interpreter.arithmeticHelper.concat = joinBounded
  }

  round(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('ROUND'), (value: number, places: number) =>
      roundDecimal(value, places, 'half'),
    )
  }

  roundUp(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('ROUNDUP'), (value: number, places: number) =>
      roundDecimal(value, places, 'up'),
    )
  }

  roundDown(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('ROUNDDOWN'), (value: number, places: number) =>
      roundDecimal(value, places, 'down'),
    )
  }

  truncate(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('TRUNC'), (value: number, places: number) =>
      roundDecimal(value, places, 'down'),
    )
  }

  integer(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('INT'), (value: number) => floorDecimal(value))
  }

  ceiling(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('CEILING'), (value: number, step: number) => {
      if (value === 0 || step === 0) return 0
      if (value > 0 && step < 0) return new CellError(ErrorType.NUM, 'Distinct signs.')
      return tidy(ceilingDecimal(value / step) * step)
    })
  }

  floor(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('FLOOR'), (value: number, step: number) => {
      if (value === 0) return 0
      if (step === 0) return new CellError(ErrorType.DIV_BY_ZERO)
      if (value > 0 && step < 0) return new CellError(ErrorType.NUM, 'Distinct signs.')
      return tidy(floorDecimal(value / step) * step)
    })
  }

  multiple(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('MROUND'), (value: number, step: number) => {
      if (step === 0) return 0
      if (value * step < 0) return new CellError(ErrorType.NUM, 'Distinct signs.')
      return tidy(roundDecimal(value / step, 0, 'half') * step)
    })
  }

  quotient(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('QUOTIENT'), (value: number, divisor: number) =>
      divisor === 0 ? new CellError(ErrorType.DIV_BY_ZERO) : roundDecimal(value / divisor, 0, 'down'),
    )
  }

  modulo(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('MOD'), (value: number, divisor: number) => {
      if (divisor === 0) return new CellError(ErrorType.DIV_BY_ZERO)
      const rest = value - divisor * floorDecimal(value / divisor)
      return Math.abs(rest) < Math.abs(value) * 1e-14 ? 0 : rest
    })
  }

  repeat(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('REPT'), (text: string, count: number) => {
      if (count < 0) return new CellError(ErrorType.VALUE, 'Count cannot be negative.')
      if (text.length * count > limits.textLength) {
        return new CellError(ErrorType.VALUE, 'Result exceeds the maximum allowed length.')
      }
      return text.repeat(count)
    })
  }

  oneValue(ast: Call, state: State): Value {
    return this.runFunction(ast.args, state, this.metadata('ONE_VALUE'), (range: { data: Value[][] }) => {
      return range.data[0]?.[0] ?? new CellError(ErrorType.VALUE)
    })
  }
}
