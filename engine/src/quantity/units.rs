//! The unit table: one row a unit, with its exact factor, its dimension and where the definition stands.

use super::dimension::Dimension;
use super::factor::Factor;
use super::kind::SpeedKind;

/// The family of units that a unit belongs to, for choosing the unit in which a result is shown.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum System {
    /// Metric: metres, kilograms, newtons and what is made of them.
    Metric,
    /// United States customary, and the imperial gallon.
    Us,
    /// Neither: knots, nautical miles, seconds, degrees, per cent and the like.
    Either,
}

/// One row of the unit table.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct UnitRow {
    /// The symbols by which the unit is typed, letter for letter; the first is the one shown.
    pub symbols: &'static [&'static str],
    /// The unit's name in the singular.
    pub name: &'static str,
    /// So many of the SI unit of the dimension make one of this unit.
    pub factor: Factor,
    /// The dimension.
    pub dimension: Dimension,
    /// Kelvins to be added after scaling, for the temperature scales that do not begin at absolute zero.
    pub offset: Option<Factor>,
    /// Which airspeed the unit measures, where it says so.
    pub speed_kind: Option<SpeedKind>,
    /// Whether the SI prefixes may stand before the symbols.
    pub prefixes: bool,
    /// Metric, US or neither.
    pub system: System,
    /// Whether the factor is exact by definition; every row is, the mercury columns by their conventional density.
    pub exact: bool,
    /// Where the definition stands.
    pub source: &'static str,
}

impl UnitRow {
    const fn new(
        symbols: &'static [&'static str],
        name: &'static str,
        factor: Factor,
        dimension: Dimension,
        system: System,
        source: &'static str,
    ) -> Self {
        Self {
            symbols,
            name,
            factor,
            dimension,
            offset: None,
            speed_kind: None,
            prefixes: false,
            system,
            exact: true,
            source,
        }
    }

    const fn prefixed(self) -> Self {
        Self {
            prefixes: true,
            ..self
        }
    }

    const fn offset_by(self, offset: Factor) -> Self {
        Self {
            offset: Some(offset),
            ..self
        }
    }

    const fn of_kind(self, kind: SpeedKind) -> Self {
        Self {
            speed_kind: Some(kind),
            ..self
        }
    }
}

/// The unit table, in the order in which a list of units is shown.
///
/// # Example
/// ```
/// use engine::quantity::units;
/// assert!(units::rows().iter().all(|row| !row.source.is_empty()));
/// ```
pub fn rows() -> &'static [UnitRow] {
    ROWS
}

/// A prefix of the SI: its symbols and the power of ten that it stands for.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Prefix {
    /// The symbols; the micro sign and the Greek letter are both micro.
    pub symbols: &'static [&'static str],
    /// The power of ten.
    pub exponent: i32,
}

/// The prefixes of the SI, from the largest to the smallest (BIPM SI Brochure).
pub fn prefixes() -> &'static [Prefix] {
    PREFIXES
}

const fn prefix(symbols: &'static [&'static str], exponent: i32) -> Prefix {
    Prefix { symbols, exponent }
}

const PREFIXES: &[Prefix] = &[
    prefix(&["Q"], 30),
    prefix(&["R"], 27),
    prefix(&["Y"], 24),
    prefix(&["Z"], 21),
    prefix(&["E"], 18),
    prefix(&["P"], 15),
    prefix(&["T"], 12),
    prefix(&["G"], 9),
    prefix(&["M"], 6),
    prefix(&["k"], 3),
    prefix(&["h"], 2),
    prefix(&["da"], 1),
    prefix(&["d"], -1),
    prefix(&["c"], -2),
    prefix(&["m"], -3),
    prefix(&["\u{b5}", "\u{3bc}"], -6),
    prefix(&["n"], -9),
    prefix(&["p"], -12),
    prefix(&["f"], -15),
    prefix(&["a"], -18),
    prefix(&["z"], -21),
    prefix(&["y"], -24),
    prefix(&["r"], -27),
    prefix(&["q"], -30),
];

const SI: &str = "BIPM SI Brochure";
const NIST: &str = "NIST SP 811, App. B";
const MERCURY: &str = "conventional column of mercury: 13595.1 kg/m^3 (conventional density) times 9.80665 m/s^2; NIST SP 811, App. B";

const FOOT: Factor = Factor::ratio(3048, 10_000);
const INCH: Factor = Factor::ratio(254, 10_000);
const MILE: Factor = FOOT.times(Factor::ratio(5280, 1));
const NAUTICAL_MILE: Factor = Factor::ratio(1852, 1);
const MINUTE: Factor = Factor::ratio(60, 1);
const HOUR: Factor = Factor::ratio(3600, 1);
const KNOT: Factor = NAUTICAL_MILE.over(HOUR);
const GRAVITY: Factor = Factor::ratio(980_665, 100_000);
const POUND_MASS: Factor = Factor::ratio(45_359_237, 100_000_000);
const POUND: Factor = POUND_MASS.times(GRAVITY);
const MERCURY_METER: Factor = Factor::ratio(135_951, 10).times(GRAVITY);
const DEGREE: Factor = Factor::PI.over(Factor::ratio(180, 1));
const LITER: Factor = Factor::ratio(1, 1000);

const ROWS: &[UnitRow] = &{
    use Dimension as D;
    use Factor as F;
    use System::{Either, Metric, Us};
    use UnitRow as U;
    [
        U::new(&["m"], "meter", F::ONE, D::LENGTH, Metric, SI).prefixed(),
        U::new(&["ft"], "foot", FOOT, D::LENGTH, Us, NIST),
        U::new(&["in"], "inch", INCH, D::LENGTH, Us, NIST),
        U::new(
            &["yd"],
            "yard",
            FOOT.times(F::ratio(3, 1)),
            D::LENGTH,
            Us,
            NIST,
        ),
        U::new(&["mi"], "mile", MILE, D::LENGTH, Us, NIST),
        U::new(
            &["NM"],
            "nautical mile",
            NAUTICAL_MILE,
            D::LENGTH,
            Either,
            SI,
        ),
        U::new(&["ha"], "hectare", F::ratio(10_000, 1), D::AREA, Metric, SI),
        U::new(&["L"], "liter", LITER, D::VOLUME, Metric, SI).prefixed(),
        U::new(
            &["USgal"],
            "US gallon",
            INCH.power(3).times(F::ratio(231, 1)),
            D::VOLUME,
            Us,
            NIST,
        ),
        U::new(
            &["impgal"],
            "imperial gallon",
            LITER.times(F::ratio(454_609, 100_000)),
            D::VOLUME,
            Us,
            NIST,
        ),
        U::new(&["g"], "gram", F::ratio(1, 1000), D::MASS, Metric, SI).prefixed(),
        U::new(&["lbm"], "pound-mass", POUND_MASS, D::MASS, Us, NIST),
        U::new(&["slug"], "slug", POUND.over(FOOT), D::MASS, Us, NIST),
        U::new(&["s"], "second", F::ONE, D::TIME, Either, SI).prefixed(),
        U::new(&["min"], "minute", MINUTE, D::TIME, Either, SI),
        U::new(&["h"], "hour", HOUR, D::TIME, Either, SI),
        U::new(&["K"], "kelvin", F::ONE, D::TEMPERATURE, Metric, SI).prefixed(),
        U::new(
            &["degC"],
            "degree Celsius",
            F::ONE,
            D::TEMPERATURE,
            Metric,
            SI,
        )
        .offset_by(F::ratio(27_315, 100)),
        U::new(
            &["degF"],
            "degree Fahrenheit",
            F::ratio(5, 9),
            D::TEMPERATURE,
            Us,
            NIST,
        )
        .offset_by(F::ratio(45_967, 180)),
        U::new(
            &["degR"],
            "degree Rankine",
            F::ratio(5, 9),
            D::TEMPERATURE,
            Us,
            NIST,
        ),
        U::new(&["N"], "newton", F::ONE, D::FORCE, Metric, SI).prefixed(),
        U::new(
            &["kgf", "kp"],
            "kilogram-force",
            GRAVITY,
            D::FORCE,
            Metric,
            NIST,
        ),
        U::new(
            &["lb", "lbs", "lbf"],
            "pound-force",
            POUND,
            D::FORCE,
            Us,
            NIST,
        ),
        U::new(
            &["oz"],
            "ounce-force",
            POUND.over(F::ratio(16, 1)),
            D::FORCE,
            Us,
            NIST,
        ),
        U::new(&["Pa"], "pascal", F::ONE, D::PRESSURE, Metric, SI).prefixed(),
        U::new(
            &["bar"],
            "bar",
            F::ratio(100_000, 1),
            D::PRESSURE,
            Metric,
            SI,
        )
        .prefixed(),
        U::new(
            &["atm"],
            "standard atmosphere",
            F::ratio(101_325, 1),
            D::PRESSURE,
            Either,
            NIST,
        ),
        U::new(
            &["psf"],
            "pound per square foot",
            POUND.over(FOOT.power(2)),
            D::PRESSURE,
            Us,
            NIST,
        ),
        U::new(
            &["psi"],
            "pound per square inch",
            POUND.over(INCH.power(2)),
            D::PRESSURE,
            Us,
            NIST,
        ),
        U::new(
            &["ksi"],
            "kilopound per square inch",
            POUND.over(INCH.power(2)).times(F::ratio(1000, 1)),
            D::PRESSURE,
            Us,
            NIST,
        ),
        U::new(
            &["inHg"],
            "inch of mercury",
            MERCURY_METER.times(INCH),
            D::PRESSURE,
            Us,
            MERCURY,
        ),
        U::new(
            &["mmHg"],
            "millimeter of mercury",
            MERCURY_METER.over(F::ratio(1000, 1)),
            D::PRESSURE,
            Metric,
            MERCURY,
        ),
        U::new(&["J"], "joule", F::ONE, D::MOMENT, Metric, SI).prefixed(),
        U::new(&["W"], "watt", F::ONE, D::POWER, Metric, SI).prefixed(),
        U::new(
            &["hp"],
            "horsepower",
            POUND.times(FOOT).times(F::ratio(550, 1)),
            D::POWER,
            Us,
            NIST,
        ),
        U::new(&["kt", "kn", "kts"], "knot", KNOT, D::SPEED, Either, SI),
        U::new(
            &["KEAS"],
            "knot, equivalent airspeed",
            KNOT,
            D::SPEED,
            Either,
            "common practice; the knot: BIPM SI Brochure",
        )
        .of_kind(SpeedKind::Equivalent),
        U::new(
            &["KCAS"],
            "knot, calibrated airspeed",
            KNOT,
            D::SPEED,
            Either,
            "common practice; the knot: BIPM SI Brochure",
        )
        .of_kind(SpeedKind::Calibrated),
        U::new(
            &["KTAS"],
            "knot, true airspeed",
            KNOT,
            D::SPEED,
            Either,
            "common practice; the knot: BIPM SI Brochure",
        )
        .of_kind(SpeedKind::True),
        U::new(
            &["mph"],
            "mile per hour",
            MILE.over(HOUR),
            D::SPEED,
            Us,
            NIST,
        ),
        U::new(
            &["kph"],
            "kilometer per hour",
            F::ratio(1000, 1).over(HOUR),
            D::SPEED,
            Metric,
            SI,
        ),
        U::new(
            &["fpm"],
            "foot per minute",
            FOOT.over(MINUTE),
            D::SPEED,
            Us,
            NIST,
        ),
        U::new(&["rad"], "radian", F::ONE, D::ANGLE, Either, SI).prefixed(),
        U::new(&["deg", "\u{b0}"], "degree", DEGREE, D::ANGLE, Either, SI),
        U::new(
            &["arcmin"],
            "minute of arc",
            DEGREE.over(F::ratio(60, 1)),
            D::ANGLE,
            Either,
            SI,
        ),
        U::new(
            &["rpm"],
            "revolution per minute",
            F::PI.times(F::ratio(2, 1)).over(MINUTE),
            D::ANGULAR_SPEED,
            Either,
            "NIST SP 811, App. B: one revolution is 2 pi rad",
        ),
        U::new(&["Hz"], "hertz", F::ONE, D::FREQUENCY, Either, SI).prefixed(),
        U::new(&["%"], "per cent", F::ratio(1, 100), D::NONE, Either, SI),
    ]
};

#[cfg(test)]
mod tests {
    use super::super::unit::Unit;
    use super::*;

    /// Every row against its definition worked out in another way: a decimal value or a chain of doubles.
    #[test]
    fn every_row_has_the_factor_of_its_definition() {
        let g0 = 9.80665;
        let pound = 4.448_221_615_260_5;
        let pi = std::f64::consts::PI;
        let expected = [
            ("m", 1.0),
            ("ft", 12.0 * 0.0254),
            ("in", 0.0254),
            ("yd", 0.9144),
            ("mi", 1609.344),
            ("NM", 1852.0),
            ("ha", 1e4),
            ("L", 1e-3),
            ("USgal", 3.785_411_784e-3),
            ("impgal", 4.546_09e-3),
            ("g", 1e-3),
            ("lbm", 0.453_592_37),
            ("slug", 14.593_902_937_206_364),
            ("s", 1.0),
            ("min", 60.0),
            ("h", 3600.0),
            ("K", 1.0),
            ("degC", 1.0),
            ("degF", 1.0 / 1.8),
            ("degR", 1.0 / 1.8),
            ("N", 1.0),
            ("kgf", g0),
            ("lb", pound),
            ("oz", 0.028_349_523_125 * g0),
            ("Pa", 1.0),
            ("bar", 1e5),
            ("atm", 101_325.0),
            ("psf", pound / 0.092_903_04),
            ("psi", pound / 6.4516e-4),
            ("ksi", 6_894_757.293_168_361),
            ("inHg", 3_386.388_640_341),
            ("mmHg", 133.322_387_415),
            ("J", 1.0),
            ("W", 1.0),
            ("hp", 745.699_871_582_270_2),
            ("kt", 1852.0 / 3600.0),
            ("KEAS", 1852.0 / 3600.0),
            ("KCAS", 1852.0 / 3600.0),
            ("KTAS", 1852.0 / 3600.0),
            ("mph", 0.447_04),
            ("kph", 1.0 / 3.6),
            ("fpm", 0.005_08),
            ("rad", 1.0),
            ("deg", pi / 180.0),
            ("arcmin", pi / 10_800.0),
            ("rpm", pi / 30.0),
            ("Hz", 1.0),
            ("%", 0.01),
        ];
        assert_eq!(rows().len(), expected.len());
        for (row, (symbol, factor)) in rows().iter().zip(expected) {
            assert_eq!(row.symbols[0], symbol);
            assert!(
                (row.factor.value() / factor - 1.0).abs() < 4e-16,
                "{symbol}: {}",
                row.factor.value()
            );
            assert!(
                row.exact && row.factor.is_exact() && !row.source.is_empty(),
                "{symbol}"
            );
        }
    }

    /// NIST SP 811 definitions: 1 in = 25.4 mm, 1 lb = 0.45359237 kg, 1 nautical mile = 1852 m, with standard gravity
    /// 9.80665 m/s^2; the printed digits limit the agreement where a value does not end.
    #[test]
    fn conversions_agree_with_published_definitions() {
        let u = |symbol: &str| Unit::named(symbol).unwrap();
        let ft2 = u("ft").power(2).unwrap();
        let ft3 = u("ft").power(3).unwrap();
        let rows = [
            (u("in"), u("m"), 0.0254),
            (u("ft"), u("m"), 0.3048),
            (u("NM"), u("m"), 1852.0),
            (u("kt"), Unit::ONE, 0.514_444_444_4),
            (u("kt"), u("ft").over(u("s")).unwrap(), 1.687_809_857),
            (u("kt"), u("mph"), 1.150_779_448),
            (u("lbm"), u("kg"), 0.453_592_37),
            (u("lbf"), u("N"), 4.448_221_615),
            (u("slug"), u("kg"), 14.593_902_94),
            (u("slug"), u("lbm"), 32.174_048_56),
            (
                u("slug").over(ft3).unwrap(),
                u("kg").over(u("m").power(3).unwrap()).unwrap(),
                515.378_818_4,
            ),
            (u("lbf").over(ft2).unwrap(), u("Pa"), 47.880_258_98),
            (u("lbf").times(u("ft")).unwrap(), u("J"), 1.355_817_948),
            (
                u("psf"),
                u("kgf").over(u("m").power(2).unwrap()).unwrap(),
                4.882_427_636,
            ),
            (u("deg"), u("rad"), 0.017_453_292_52),
            (ft2, u("m").power(2).unwrap(), 0.092_903_04),
        ];
        for (one, other, expected) in rows {
            let value = other.from_si(one.to_si(1.0));
            assert!((value / expected - 1.0).abs() < 2e-9, "{value} {expected}");
        }
        assert!((u("inHg").from_si(101_325.0) - 29.921_26).abs() < 5e-6);
    }

    #[test]
    fn symbols_are_unique_and_found_first() {
        for (i, row) in rows().iter().enumerate() {
            for symbol in row.symbols {
                assert_eq!(
                    Unit::named(symbol).map(|u| u.dimension),
                    Some(row.dimension),
                    "{symbol}"
                );
                assert_eq!(
                    Unit::named(symbol).map(|u| u.factor),
                    Some(row.factor),
                    "{symbol}"
                );
                assert!(
                    rows()
                        .iter()
                        .skip(i + 1)
                        .all(|other| !other.symbols.contains(symbol)),
                    "{symbol}"
                );
            }
        }
    }
}
