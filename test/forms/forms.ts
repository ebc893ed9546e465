/**
 * Seventy forms that must be drawn and some that must be refused, written before the
 * prover was. Common practice: they are the shapes people state, and the traps among them.
 */
type End = number | 'unbounded';

export interface Form {
  readonly number: number;
  readonly density: string;
  readonly from: End;
  readonly to: End;
  /** The acceptance that the proof has to promise. */
  readonly leastAcceptance: number;
  readonly note: string;
}

interface RefusedForm {
  readonly density: string;
  readonly from: End;
  readonly to: End;
  readonly because: string;
  /** True where drawing is as good as refusing. */
  readonly mayBeDrawn?: boolean;
}

function form(
  number: number,
  density: string,
  from: End,
  to: End,
  leastAcceptance: number,
  note = '',
): Form {
  return { number, density, from, to, leastAcceptance, note };
}

export const forms: readonly Form[] = [
  // Finite limits: all of them.
  form(1, 'EXP(-0.5*((x-3)/0.8)^2)', 0, 6, 0.99),
  form(2, '0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-7)^2)', 0, 10, 0.99, 'two humps'),
  form(3, 'x^1.5*(1-x)^0.5', 0, 1, 0.99, 'infinite slope at an end'),
  form(4, 'x^3*EXP(-2*x)', 0, 12, 0.99),
  form(5, 'EXP(-(x^2))*(1+SIN(3*x)^2)', -4, 4, 0.99),
  form(6, 'MAX(0,1-ABS(x-2)/1.5)', 0, 5, 0.99, 'kinks, zero stretch'),
  form(7, 'IF(x<2,1+x,0.5*EXP(-(x-2)))', 0, 6, 0.99, 'jump'),
  form(8, '1+2000*EXP(-(((x-31)/0.0001)^2))', 0, 100, 0.99, 'spike on a floor'),
  form(9, '1/(1+EXP(-2*(x-4)))', 0, 10, 0.99),
  form(10, '1/(1+((x-3)/0.01)^2)', -1000, 1000, 0.99),
  form(11, 'x^4-4*x^3+6*x^2-4*x+1', 0, 2, 0.99, '(x−1)^4 expanded: sign unsettled at 1'),
  form(12, 'ABS(SIN(5*x))*EXP(-x/3)', 0, 9, 0.99),
  form(13, 'GAMMA(x)', 1, 5, 0.99),
  form(14, 'EXP(GAMMALN(x+3)-GAMMALN(x+1))', 0, 20, 0.99),
  form(15, 'ERFC((x-2)/SQRT(2))', -3, 6, 0.99),
  form(16, 'COSH(x)*IF(ABS(x)<2,1,0.1)', -3, 3, 0.99),
  form(17, 'INT(x)+MOD(x,1)^2', 0, 5, 0.99),
  form(
    18,
    'SIN(x)/x',
    -3,
    3,
    0.99,
    'removable 0/0: a refusal that says how to write it is accepted',
  ),
  form(19, 'SQRT(1-x^2)', -1, 1, 0.99),
  form(20, 'PHI((x-1)/0.5)*NORM.S.DIST(3*(x-1),TRUE)', -2, 4, 0.99),
  form(21, 'NORM.DIST(x,5,2,FALSE)*(x<6)', 0, 10, 0.99),
  form(22, 'BETA.DIST(x,2,5,FALSE)', 0, 1, 0.99),
  form(23, 'LOGNORM.DIST(x,1,0.5,FALSE)', 0.5, 12, 0.99),
  form(24, 'SUM({0.2,0.5,0.3}*EXP(-0.5*((x-{1,4,8})/{0.5,1,0.7})^2))', 0, 10, 0.99),
  form(25, 'LET(u,LN(x/50),EXP(-0.5*u^2)/x)', 5, 400, 0.99),
  form(26, 'PRODUCT(1/(1+EXP(-(x-{1,2,3,4,5}))))*EXP(-x)', 0, 15, 0.99),
  form(27, 'EXP(800-5*(x-3)^2)', 0, 6, 0.99, 'overflows'),
  form(28, 'EXP(-900-x)', 0, 5, 0.99, 'underflows'),
  form(29, '1E200*(2+COS(7*x))', -3, 5, 0.99),
  form(30, '(x-1)^2*(x-3)^2', 0, 4, 0.99, 'touches zero'),
  form(31, 'IF(AND(x>1,x<3),0,EXP(-x/2))', 0, 6, 0.99, 'gap'),
  form(32, 'x^x', 0, 2, 0.99, '0^0 at an end only'),
  form(33, 'SIN(1/x)+1.5', 0.05, 1, 0.99),
  form(34, 'SIN(1/x)+1.5', 0, 1, 0.9, 'endless waves, bounded'),
  form(35, 'TANH(x)+1', -4, 4, 0.99),
  form(36, 'ATAN(5*(x-1))+2', 0, 3, 0.99),
  // Unbounded limits and poles: at least 32 of these 34.
  form(37, 'EXP(-0.5*((x-250)/4)^2)', 'unbounded', 'unbounded', 0.99),
  form(38, 'EXP(-ABS(x+1)/2)', 'unbounded', 'unbounded', 0.99),
  form(39, '1/(1+((x-5)/2)^2)', 'unbounded', 'unbounded', 0.99),
  form(40, '(1+x^2/3)^-2', 'unbounded', 'unbounded', 0.99),
  form(41, '(1+x^2/1.2)^-1.1', 'unbounded', 'unbounded', 0.99, 'heavy'),
  form(42, 'EXP(-2*(LN(x)-1)^2)/x', 0, 'unbounded', 0.99),
  form(43, 'x^0.5*EXP(-((x/2)^1.5))', 0, 'unbounded', 0.99),
  form(44, 'x^-0.5*EXP(-x)', 0, 'unbounded', 0.99, 'pole'),
  form(45, 'EXP(-x-EXP(-x))', 'unbounded', 'unbounded', 0.99),
  form(46, 'x^-3.5', 2, 'unbounded', 0.99),
  form(47, 'EXP(x)*(x<1)', 'unbounded', 3, 0.99),
  form(48, '1/COSH(x)', 'unbounded', 'unbounded', 0.99),
  form(49, 'EXP(-(x^4))', 'unbounded', 'unbounded', 0.99),
  form(50, 'EXP(-((x^2-1)^2))', 'unbounded', 'unbounded', 0.99),
  form(51, 'EXP(-SQRT(1+x^2))', 'unbounded', 'unbounded', 0.99),
  form(52, 'x^-1.5*EXP(-1.5*(x-2)^2/x)', 0, 'unbounded', 0.99),
  form(53, '(2+COS(x^2))*EXP(-ABS(x))', 'unbounded', 'unbounded', 0.5),
  form(54, 'SIN(x)^2*EXP(-x)', 0, 'unbounded', 0.9),
  form(55, 'EXP(-0.5*x^2)*(1+SIN(3*x)^2)', 'unbounded', 'unbounded', 0.99),
  form(56, 'EXP(x)/(1+EXP(x))^2', 'unbounded', 'unbounded', 0.99, 'EXP overflows inside'),
  form(57, 'x^2/(EXP(x)-1)', 0, 'unbounded', 0.99, '0/0 at 0'),
  form(58, '(1-x)^-0.3*x^2', 0, 1, 0.99, 'pole at the right'),
  form(59, '-LN(x)', 0, 1, 0.9, 'logarithmic pole'),
  form(60, 'x^-0.5*(1-x)^-0.5', 0, 1, 0.99, 'two poles'),
  form(61, '(x-2)^-2.5*(x>3)', 2, 'unbounded', 0.99, 'pole hidden by a condition'),
  form(62, 'EXP(-x)*(x>=5)', 0, 'unbounded', 0.99),
  form(63, 'NORM.DIST(x,0,1,FALSE)*EXP(0.3*x)', 'unbounded', 'unbounded', 0.99),
  form(64, 'LOGNORM.DIST(x,1,0.5,FALSE)', 0, 'unbounded', 0.99),
  form(65, 'T.DIST(x,4,FALSE)', 'unbounded', 'unbounded', 0.99),
  form(66, 'GAMMA.DIST(x,0.7,2,FALSE)', 0, 'unbounded', 0.99, 'pole'),
  form(67, 'WEIBULL.DIST(x,1.5,3,FALSE)', 0, 'unbounded', 0.99),
  form(68, 'EXPON.DIST(x,0.2,FALSE)*(1+SIN(x))', 0, 'unbounded', 0.99),
  form(69, 'POISSON.DIST(7,x,FALSE)', 0, 'unbounded', 0.99, 'a rate after 7 events'),
  form(70, 'BINOM.DIST(3,50,x,FALSE)', 0, 1, 0.99, 'a chance after 3 in 50'),
];

/** Each with its own message. */
export const refusedForms: readonly RefusedForm[] = [
  { density: '1/x', from: 1, to: 'unbounded', because: 'no finite area' },
  { density: '1/(1+ABS(x))', from: 'unbounded', to: 'unbounded', because: 'no finite area' },
  { density: '1', from: 0, to: 'unbounded', because: 'no finite area' },
  { density: 'EXP(x)', from: 0, to: 'unbounded', because: 'no finite area' },
  { density: 'x^-1', from: 0, to: 1, because: 'a pole without area bound' },
  { density: 'TAN(x)^2', from: 0, to: 3, because: 'a pole inside' },
  { density: 'SIN(x)', from: 0, to: 10, because: 'negative, where' },
  { density: 'LN(x)', from: 0.5, to: 2, because: 'negative' },
  { density: 'x-x', from: 0, to: 1, because: 'zero everywhere' },
  { density: 'SQRT(x-1)', from: 0, to: 3, because: 'undefined below 1' },
  { density: 'EXP(-x^2)', from: -3, to: 3, because: 'bare minus before ^, with the rewrite' },
  { density: 'EXP(-0,5*x)', from: 0, to: 10, because: 'decimal comma' },
  { density: 'x+y', from: 0, to: 1, because: 'unknown name y' },
  { density: 'EXP(-(x^2)', from: -3, to: 3, because: 'bracket' },
  {
    density: '1/(x*LN(x)^2)',
    from: 2,
    to: 'unbounded',
    because: 'its area is finite, which the rules cannot see',
    mayBeDrawn: true,
  },
  {
    density: '1-TANH(x)^2',
    from: 'unbounded',
    to: 'unbounded',
    because: 'it cancels far out',
    mayBeDrawn: true,
  },
];

/** All but the removable 0/0 of form 18, which may be refused and is. */
export const drawnForms: readonly Form[] = forms.filter(({ number }) => number !== 18);

/** The limits of a form as numbers. */
export function limitsOf({ from, to }: Pick<Form, 'from' | 'to'>): readonly [number, number] {
  return [from === 'unbounded' ? -Infinity : from, to === 'unbounded' ? Infinity : to];
}
