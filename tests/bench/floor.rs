//! The floor of the envelope workload: what a person would write by hand for this one sheet, every line over its own
//! axes, the fifteen lines over all five fused into one loop over blocks that stay in the first cache, divisors known
//! before the loop turned into reciprocals, extremes taken on the way.

/// Axes of a size: altitude, weight, centre of gravity, speed, load factor.
pub(crate) const SIZES: [(char, [usize; 5]); 5] = [
    ('a', [1, 1, 2, 2, 2]),
    ('b', [2, 2, 5, 10, 5]),
    ('c', [5, 5, 10, 20, 20]),
    ('d', [10, 10, 20, 50, 20]),
    ('e', [10, 20, 25, 100, 20]),
];

/// Values in a vector register of 256 bits.
const LANES: usize = 4;
/// Conditions worked out together.
const BLOCK: usize = 512;

const FOOT: f64 = 0.3048;
const POUND: f64 = 4.448_221_615_260_5;
const KNOT: f64 = 1852.0 / 3600.0;
const DEGREE: f64 = std::f64::consts::PI / 180.0;

// The constants of the sheet, in SI.
const S: f64 = 142.0 * FOOT * FOOT;
const C: f64 = 4.6 * FOOT;
const X_AC: f64 = 6.1 * FOOT;
const X_HT: f64 = 17.3 * FOOT;
const X_FS: f64 = 10.5 * FOOT;
const S_T: f64 = 24.0 * FOOT * FOOT;
const AL0: f64 = -2.0 * DEGREE;
const INCIDENCE: f64 = -2.0 * DEGREE;
const A0: f64 = 5.7;
const A_T: f64 = 4.0;
const A_E: f64 = 2.2;
const F_AFT: f64 = 0.09;
const GEARING: f64 = 0.6 / FOOT;
const TAIL_ARM: f64 = X_HT - X_AC;
const DOWNWASH: f64 = 2.0 / (std::f64::consts::PI * 7.0);
const CL: [f64; 7] = [-1.5, -0.8, -0.2, 0.3, 0.8, 1.2, 1.6];
const CM: [f64; 7] = [-0.02, -0.035, -0.045, -0.05, -0.058, -0.07, -0.1];

/// What is left of a run: the extremes of P with their conditions, and of the other results.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Extremes {
    /// The largest P in newtons, and its condition.
    pub(crate) largest: (f64, usize),
    /// The smallest.
    pub(crate) smallest: (f64, usize),
    low: [f64; 5],
    high: [f64; 5],
    use_of_strength: f64,
    drag: f64,
    eas: f64,
}

/// The points of one axis; a single one is the last.
fn points(from: f64, to: f64, count: usize) -> Vec<f64> {
    let at = |i: usize| from + (to - from) * i as f64 / (count - 1) as f64;
    if count == 1 {
        vec![to]
    } else {
        (0..count).map(at).collect()
    }
}

#[derive(Clone, Copy)]
struct Lanes([f64; LANES]);

impl Lanes {
    #[inline(always)]
    fn all(value: f64) -> Self {
        Lanes([value; LANES])
    }

    #[inline(always)]
    fn load(from: &[f64], at: usize) -> Self {
        let mut lanes = [0.0; LANES];
        lanes.copy_from_slice(&from[at..at + LANES]);
        Lanes(lanes)
    }

    #[inline(always)]
    fn store(self, to: &mut [f64], at: usize) {
        to[at..at + LANES].copy_from_slice(&self.0);
    }

    #[inline(always)]
    fn with(self, other: Self, f: impl Fn(f64, f64) -> f64) -> Self {
        let mut lanes = [0.0; LANES];
        for (i, lane) in lanes.iter_mut().enumerate() {
            *lane = f(self.0[i], other.0[i]);
        }
        Lanes(lanes)
    }

    /// The product and a sum, rounded once.
    #[inline(always)]
    #[expect(
        clippy::disallowed_methods,
        reason = "the floor is to be as quick as the machine allows"
    )]
    fn times_plus(self, by: Self, plus: Self) -> Self {
        let mut lanes = [0.0; LANES];
        for (i, lane) in lanes.iter_mut().enumerate() {
            *lane = self.0[i].mul_add(by.0[i], plus.0[i]);
        }
        Lanes(lanes)
    }

    #[inline(always)]
    fn plus(self, other: Self) -> Self {
        self.with(other, |a, b| a + b)
    }

    #[inline(always)]
    fn less(self, other: Self) -> Self {
        self.with(other, |a, b| a - b)
    }

    #[inline(always)]
    fn times(self, other: Self) -> Self {
        self.with(other, |a, b| a * b)
    }

    #[inline(always)]
    fn over(self, other: Self) -> Self {
        self.with(other, |a, b| a / b)
    }

    #[inline(always)]
    fn max(self, other: Self) -> Self {
        self.with(other, |a, b| if a > b { a } else { b })
    }

    #[inline(always)]
    fn min(self, other: Self) -> Self {
        self.with(other, |a, b| if a < b { a } else { b })
    }

    #[inline(always)]
    fn abs(self) -> Self {
        let mut lanes = [0.0; LANES];
        for (i, lane) in lanes.iter_mut().enumerate() {
            *lane = self.0[i].abs();
        }
        Lanes(lanes)
    }

    fn largest(self) -> f64 {
        self.0.into_iter().fold(f64::NEG_INFINITY, f64::max)
    }

    fn smallest(self) -> f64 {
        self.0.into_iter().fold(f64::INFINITY, f64::min)
    }
}

/// The workload at one size, with the memory that its runs use again.
pub(crate) struct Envelope {
    lengths: [usize; 5],
    axes: [Vec<f64>; 5],
    out: Vec<f64>,
    block: Block,
}

/// Lines over altitude, weight, speed and load factor, a block at a time; padded to whole registers with the last value.
#[derive(Default)]
struct Block {
    n_w: Vec<f64>,
    moment: Vec<f64>,
    alpha: Vec<f64>,
    per_qs: Vec<f64>,
    per_qst: Vec<f64>,
    stick: Vec<f64>,
    qs: Vec<f64>,
    beta: Vec<f64>,
    n: Vec<f64>,
    p: Vec<f64>,
}

impl Block {
    fn new() -> Self {
        let room = || vec![0.0; BLOCK + 128];
        Block {
            n_w: room(),
            moment: room(),
            alpha: room(),
            per_qs: room(),
            per_qst: room(),
            stick: room(),
            qs: room(),
            beta: room(),
            n: room(),
            p: room(),
        }
    }
}

/// Running extremes in registers.
struct Running {
    p: (Lanes, Lanes),
    low: [Lanes; 5],
    high: [Lanes; 5],
    use_of_strength: Lanes,
}

/// A run to be compiled for the widest registers: unlike a closure it is always put in place.
struct Run<'a>(&'a mut Envelope);

impl pulp::WithSimd for Run<'_> {
    type Output = Extremes;

    #[inline(always)]
    fn with_simd<S: pulp::Simd>(self, _: S) -> Extremes {
        self.0.all()
    }
}

impl Envelope {
    /// The workload; P is kept where `stored` says so.
    #[must_use]
    pub(crate) fn new(lengths: [usize; 5], stored: bool) -> Self {
        let [h, w, cg, v, n] = lengths;
        let conditions: usize = lengths.iter().product();
        Envelope {
            lengths,
            axes: [
                points(12_000.0, 0.0, h),
                points(1600.0, 2550.0, w),
                points(5.6, 6.5, cg),
                points(60.0, 180.0, v),
                points(-1.52, 3.8, n),
            ],
            out: vec![0.0; if stored { conditions } else { 0 }],
            block: Block::new(),
        }
    }

    /// One run.
    pub(crate) fn run(&mut self) -> Extremes {
        pulp::Arch::new().dispatch(Run(self))
    }

    #[inline(always)]
    fn all(&mut self) -> Extremes {
        let (inf, none) = (f64::INFINITY, f64::NEG_INFINITY);
        let (most, least) = (Lanes::all(none), Lanes::all(inf));
        let mut running = Running {
            p: (most, least),
            low: [least; 5],
            high: [most; 5],
            use_of_strength: most,
        };
        let mut found = Extremes {
            largest: (none, 0),
            smallest: (inf, 0),
            low: [inf; 5],
            high: [none; 5],
            use_of_strength: none,
            drag: none,
            eas: none,
        };
        for h in 0..self.lengths[0] {
            self.altitude(h, &mut running, &mut found);
        }
        for i in 0..5 {
            found.low[i] = running.low[i].smallest();
            found.high[i] = running.high[i].largest();
        }
        found.use_of_strength = running.use_of_strength.largest();
        found
    }

    #[inline(always)]
    fn altitude(&mut self, h: usize, running: &mut Running, found: &mut Extremes) {
        let [_, weights, cgs, speeds, factors] = self.lengths;
        let t = 288.15 - 0.0065 * (self.axes[0][h] * FOOT);
        let rho = 101_325.0 * libm::pow(t / 288.15, 5.255_876) / (287.052_87 * t);
        let sound = (1.4 * 287.052_87 * t).sqrt();
        let step = (BLOCK / factors).max(1).min(speeds);
        let mut first = 0;
        while first < speeds {
            let last = (first + step).min(speeds);
            let n = self.speeds(first..last, (rho, sound), found);
            for w in 0..weights {
                self.weight(self.axes[1][w] * POUND, n, found);
                for cg in 0..cgs {
                    let row = (h * weights + w) * cgs + cg;
                    let from = row * speeds * factors + first * factors;
                    self.centre(self.axes[2][cg] * FOOT - X_AC, from, n, running);
                    self.governing(from, n, running, found);
                }
            }
            first = last;
        }
    }

    /// The lines over altitude and speed.
    #[inline(always)]
    fn speeds(
        &mut self,
        speeds: std::ops::Range<usize>,
        (rho, sound): (f64, f64),
        found: &mut Extremes,
    ) -> usize {
        let block = &mut self.block;
        let root = (rho / 1.225).sqrt();
        let mut at = 0;
        for speed in speeds {
            let v = self.axes[3][speed] * KNOT;
            let q = 0.5 * rho * v * v;
            let mach = v / sound;
            let beta = (1.0 - mach * mach).sqrt() / A0;
            found.eas = found.eas.max(v * root);
            for n in &self.axes[4] {
                block.qs[at] = q * S;
                block.per_qs[at] = 1.0 / (q * S);
                block.per_qst[at] = 1.0 / (q * S_T);
                block.stick[at] = GEARING * q * 9.0 * FOOT * FOOT * 1.3 * FOOT;
                block.beta[at] = beta;
                block.n[at] = *n;
                at += 1;
            }
        }
        for pad in at..at.next_multiple_of(LANES) {
            for list in [
                &mut block.qs,
                &mut block.per_qs,
                &mut block.per_qst,
                &mut block.stick,
                &mut block.beta,
                &mut block.n,
            ] {
                list[pad] = list[at - 1];
            }
        }
        at
    }

    /// The lines that do not depend on the centre of gravity.
    #[inline(always)]
    fn weight(&mut self, weight: f64, n: usize, found: &mut Extremes) {
        let block = &mut self.block;
        let mut drag = Lanes::all(f64::NEG_INFINITY);
        for at in (0..n).step_by(LANES) {
            let n_w = Lanes::load(&block.n, at).times(Lanes::all(weight));
            let cl = n_w.times(Lanes::load(&block.per_qs, at));
            let qs = Lanes::load(&block.qs, at);
            let alpha = Lanes::all(AL0).plus(cl.times(Lanes::load(&block.beta, at)));
            // A table of straight lines as a sum of hinges: no branch, no search.
            let within = cl.max(Lanes::all(CL[0])).min(Lanes::all(CL[6]));
            let (mut cm, mut slope) = (Lanes::all(CM[0]), 0.0);
            for i in 0..6 {
                let next = (CM[i + 1] - CM[i]) / (CL[i + 1] - CL[i]);
                let beyond = within.less(Lanes::all(CL[i])).max(Lanes::all(0.0));
                cm = beyond.times_plus(Lanes::all(next - slope), cm);
                slope = next;
            }
            let cd = Lanes::all(0.032).plus(cl.times(cl).times(Lanes::all(0.055)));
            drag = drag.max(cd.times(qs));
            n_w.store(&mut block.n_w, at);
            alpha.store(&mut block.alpha, at);
            cm.times(qs)
                .times(Lanes::all(C))
                .store(&mut block.moment, at);
        }
        found.drag = found.drag.max(drag.largest());
    }

    /// The lines over all axes.
    #[inline(always)]
    fn centre(&mut self, arm: f64, from: usize, n: usize, running: &mut Running) {
        let block = &mut self.block;
        for at in (0..n).step_by(LANES) {
            let n_w = Lanes::load(&block.n_w, at);
            let moment = Lanes::load(&block.moment, at);
            let p = n_w
                .times_plus(Lanes::all(arm), moment)
                .times(Lanes::all(1.0 / TAIL_ARM));
            let lift = n_w.less(p);
            let x_cp = Lanes::all(X_AC).less(moment.over(lift));
            let cl_t = p.times(Lanes::load(&block.per_qst, at));
            let eps = lift
                .times(Lanes::load(&block.per_qs, at))
                .times(Lanes::all(DOWNWASH));
            let alpha_t = Lanes::load(&block.alpha, at)
                .less(eps)
                .plus(Lanes::all(INCIDENCE));
            let elevator = cl_t
                .less(alpha_t.times(Lanes::all(A_T)))
                .times(Lanes::all(1.0 / A_E));
            let pressure = p.times(Lanes::all(1.0 / S_T));
            let root = p.times(Lanes::all(9.5 * FOOT / 8.0));
            let boom = p
                .times(Lanes::all(X_HT - X_FS))
                .less(n_w.times(Lanes::all(F_AFT * (14.0 * FOOT - X_FS))));
            let shear = p.less(n_w.times(Lanes::all(F_AFT)));
            let hinge = alpha_t
                .times(Lanes::all(-0.1))
                .plus(elevator.times(Lanes::all(-0.3)));
            let force = hinge.times(Lanes::load(&block.stick, at));
            let allowed = Lanes::all(1.0 / (9000.0 * POUND * FOOT));
            let used = boom.abs().times(allowed);
            let used = used.max(shear.abs().times(Lanes::all(1.0 / (1500.0 * POUND))));
            running.p = (running.p.0.max(p), running.p.1.min(p));
            for (i, value) in [x_cp, pressure, root, boom, force].into_iter().enumerate() {
                running.low[i] = running.low[i].min(value);
                running.high[i] = running.high[i].max(value);
            }
            running.use_of_strength = running.use_of_strength.max(used);
            p.store(&mut block.p, at);
        }
        if let Some(out) = self.out.get_mut(from..from + n) {
            for (out, p) in out.iter_mut().zip(&block.p) {
                *out = p * (1.0 / POUND);
            }
        }
    }

    /// Where a block has a new extreme of P, the condition in which it stands.
    #[inline(always)]
    fn governing(&self, from: usize, n: usize, running: &Running, found: &mut Extremes) {
        let place = |value: f64| self.block.p[..n].iter().position(|p| *p == value);
        let (high, low) = (running.p.0.largest(), running.p.1.smallest());
        if high > found.largest.0 {
            found.largest = (high, from + place(high).unwrap_or(0));
        }
        if low < found.smallest.0 {
            found.smallest = (low, from + place(low).unwrap_or(0));
        }
    }
}
