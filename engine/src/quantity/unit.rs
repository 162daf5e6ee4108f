//! A unit as typed: named, or a product, quotient or power of named ones.

use super::dimension::Dimension;
use super::exponent::Exponent;
use super::factor::Factor;
use super::kind::SpeedKind;
use super::units::{self, System, UnitRow};

/// A unit: what its dimension is and how its numbers become SI numbers.
///
/// # Example
/// ```
/// use engine::quantity::{Dimension, Unit};
/// let psf = Unit::named("lb").unwrap().over(Unit::named("ft").unwrap().power(2).unwrap()).unwrap();
/// assert_eq!(psf.dimension, Dimension::PRESSURE);
/// assert_eq!(psf.factor, Unit::named("psf").unwrap().factor);
/// let ft = Unit::named("ft").unwrap();
/// assert_eq!(ft.from_si(ft.to_si(4.6)), 4.6);
/// assert_eq!(Unit::named("furlong"), None);
/// ```
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Unit {
    /// The dimension, the plane angle beside it.
    pub dimension: Dimension,
    /// So many SI units make one of this unit.
    pub factor: Factor,
    /// Kelvins added after scaling: 0 for all but the Celsius and Fahrenheit scales.
    pub offset: f64,
    /// Whether this is a temperature scale that does not begin at absolute zero.
    pub absolute: bool,
    /// Which airspeed the unit measures, where it says so.
    pub speed_kind: Option<SpeedKind>,
    /// Metric, US or neither.
    pub system: System,
}

impl Unit {
    /// The unit of pure numbers.
    pub const ONE: Self = Self {
        dimension: Dimension::NONE,
        factor: Factor::ONE,
        offset: 0.0,
        absolute: false,
        speed_kind: None,
        system: System::Either,
    };

    /// The unit of that symbol, letter for letter: a row of the table, else a prefix before a unit that takes one.
    pub fn named(symbol: &str) -> Option<Self> {
        let exact = units::rows()
            .iter()
            .find(|row| row.symbols.contains(&symbol));
        exact.map(Self::of_row).or_else(|| Self::prefixed(symbol))
    }

    /// The unit of a row of the table.
    pub fn of_row(row: &UnitRow) -> Self {
        Self {
            dimension: row.dimension,
            factor: row.factor,
            offset: row.offset.map_or(0.0, Factor::value),
            absolute: row.offset.is_some(),
            speed_kind: row.speed_kind,
            system: row.system,
        }
    }

    /// The SI unit of a dimension.
    pub const fn si(dimension: Dimension) -> Self {
        Self {
            dimension,
            system: System::Metric,
            ..Self::ONE
        }
    }

    /// The same unit for speeds of one kind, as in `m/s EAS`.
    pub const fn of_kind(self, kind: SpeedKind) -> Self {
        Self {
            speed_kind: Some(kind),
            ..self
        }
    }

    /// The product; offset and kind are dropped. `None` where an exponent overflows.
    pub fn times(self, other: Self) -> Option<Self> {
        Some(Self {
            dimension: self.dimension.times(other.dimension)?,
            factor: self.factor.times(other.factor),
            system: joined(self.system, other.system),
            ..Self::ONE
        })
    }

    /// The quotient; offset and kind are dropped. `None` where an exponent overflows.
    pub fn over(self, other: Self) -> Option<Self> {
        Some(Self {
            dimension: self.dimension.over(other.dimension)?,
            factor: self.factor.over(other.factor),
            system: joined(self.system, other.system),
            ..Self::ONE
        })
    }

    /// A whole power; offset and kind are dropped. `None` where an exponent overflows.
    pub fn power(self, exponent: i32) -> Option<Self> {
        Some(Self {
            dimension: self.dimension.power(Exponent::whole(exponent))?,
            factor: self.factor.power(exponent),
            system: self.system,
            ..Self::ONE
        })
    }

    /// Whether the unit is one of pure numbers, of angles or of something per angle.
    pub fn is_number(self) -> bool {
        self.dimension.is_number()
    }

    /// So many of this unit, in SI units.
    ///
    /// The exact factor is applied to the typed decimal with the division last, so that 35 mm and 0.035 m, or 59 degF
    /// and 288.15 K, are the same double.
    pub fn to_si(self, value: f64) -> f64 {
        match self.absolute.then(|| self.sixtieths()).flatten() {
            Some((scale, shift, below)) => (value * scale + shift) / below,
            None => self.factor.scale(value) + self.offset,
        }
    }

    /// An SI value in this unit.
    ///
    /// Where a decimal of up to 16 digits beside the quotient is the one that [`Unit::to_si`] turns into this very
    /// double, it is given, so that what was typed as 4.6 ft is shown as 4.6 ft; else the quotient.
    pub fn from_si(self, value: f64) -> f64 {
        let plain = match self.absolute.then(|| self.sixtieths()).flatten() {
            Some((scale, shift, below)) => (value * below - shift) / scale,
            None => self.factor.unscale(value - self.offset),
        };
        // Taking the zero of a temperature scale off cancels digits, so fewer of them are certain.
        let digits_min = if self.absolute { 9 } else { 15 };
        (digits_min..=16)
            .filter_map(|digits| rounded_to(plain, digits))
            .find(|candidate| self.to_si(*candidate) == value)
            .unwrap_or(plain)
    }

    fn prefixed(symbol: &str) -> Option<Self> {
        units::prefixes().iter().find_map(|prefix| {
            let rest = prefix.symbols.iter().find_map(|p| symbol.strip_prefix(p))?;
            let row = units::rows()
                .iter()
                .find(|row| row.prefixes && row.symbols.contains(&rest))?;
            let scale = Factor::ratio(10, 1).power(prefix.exponent);
            Some(Self {
                factor: row.factor.times(scale),
                ..Self::of_row(row)
            })
        })
    }

    /// Scale, shift and divisor that turn a value of this temperature scale into kelvins with one rounding at the end:
    /// whole numbers over a divisor that factor and offset share.
    fn sixtieths(self) -> Option<(f64, f64, f64)> {
        let offset = units::rows()
            .iter()
            .filter_map(|row| row.offset)
            .find(|o| o.value() == self.offset)?;
        let (above, below) = self.factor.whole_parts()?;
        let (shift, divisor) = offset.whole_parts()?;
        let scale = above * divisor / below;
        (scale.fract() == 0.0).then_some((scale, shift, divisor))
    }
}

/// US where one is and none is metric, metric where one is, else neither.
fn joined(a: System, b: System) -> System {
    match (a, b) {
        (System::Metric, _) | (_, System::Metric) => System::Metric,
        (System::Us, _) | (_, System::Us) => System::Us,
        _ => System::Either,
    }
}

fn rounded_to(value: f64, digits: usize) -> Option<f64> {
    format!("{value:.*e}", digits.saturating_sub(1))
        .parse()
        .ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn unit(symbol: &str) -> Unit {
        Unit::named(symbol).unwrap()
    }

    #[test]
    fn prefixes_stand_before_the_units_that_take_them() {
        assert_eq!(unit("kg").factor, Factor::ONE);
        assert_eq!(unit("mm").to_si(35.0), 0.035);
        assert_eq!(unit("daN").to_si(3.0), 30.0);
        assert_eq!(unit("dam").to_si(3.0), 30.0);
        assert_eq!(unit("hPa").to_si(1013.25), 101_325.0);
        assert_eq!(unit("\u{b5}m"), unit("\u{3bc}m"));
        assert_eq!(unit("mrad").dimension, Dimension::ANGLE);
        assert_eq!(unit("qm").factor.value(), 1e-30);
        for wrong in [
            "kft", "mdeg", "kmin", "kkg", "k", "", "Min", "kh", "mlb", "kdegC", "M%",
        ] {
            assert_eq!(Unit::named(wrong), None, "{wrong}");
        }
    }

    #[test]
    fn exact_symbols_win_over_prefixes() {
        assert_eq!(unit("min").to_si(1.0), 60.0);
        assert_eq!(unit("ha").dimension, Dimension::AREA);
        assert_eq!(unit("kn").dimension, Dimension::SPEED);
        assert_eq!(unit("kN").dimension, Dimension::FORCE);
        assert_eq!(unit("Pa").dimension, Dimension::PRESSURE);
        assert_eq!(unit("nm").to_si(1.0), 1e-9);
        assert_eq!(unit("rad").dimension, Dimension::ANGLE);
    }

    #[test]
    fn short_decimals_come_back_as_typed() {
        for row in units::rows() {
            let unit = Unit::of_row(row);
            for tenths in -2500..2500 {
                let typed = f64::from(tenths) / 10.0;
                assert_eq!(
                    unit.from_si(unit.to_si(typed)),
                    typed,
                    "{} {}",
                    typed,
                    row.name
                );
            }
        }
        let area = unit("ft").power(2).unwrap();
        assert_eq!(area.from_si(area.to_si(142.0)), 142.0);
    }

    /// The scales are defined by degC = K - 273.15 and degF = degR - 459.67 (BIPM SI Brochure, NIST SP 811).
    #[test]
    fn temperature_scales_are_exact() {
        assert_eq!(unit("degF").to_si(59.0), 288.15);
        assert_eq!(unit("degR").to_si(518.67), 288.15);
        assert_eq!(unit("degC").to_si(15.0), 288.15);
        assert_eq!(unit("degC").from_si(288.15), 15.0);
        assert_eq!(unit("degF").from_si(288.15), 59.0);
        assert_eq!(unit("degF").to_si(-459.67), 0.0);
        assert_eq!(unit("degC").from_si(0.0), -273.15);
        assert!(unit("degC").absolute && !unit("K").absolute && !unit("degR").absolute);
        assert!(!unit("degC").times(unit("m")).unwrap().absolute);
    }

    #[test]
    fn the_system_of_a_compound_is_that_of_its_parts() {
        assert_eq!(unit("ft").over(unit("s")).unwrap().system, System::Us);
        assert_eq!(unit("kg").over(unit("ft")).unwrap().system, System::Metric);
        assert_eq!(unit("NM").over(unit("h")).unwrap().system, System::Either);
        assert_eq!(unit("kt").times(unit("m")).unwrap().system, System::Metric);
    }

    #[test]
    fn kinds_belong_to_the_plain_unit_only() {
        assert_eq!(unit("KEAS").speed_kind, Some(SpeedKind::Equivalent));
        assert_eq!(unit("KEAS").power(2).unwrap().speed_kind, None);
        let speed = unit("m").over(unit("s")).unwrap().of_kind(SpeedKind::True);
        assert_eq!(speed.speed_kind, Some(SpeedKind::True));
        assert_eq!(unit("m").power(i32::MAX).unwrap().power(2), None);
    }

    #[test]
    fn values_that_are_no_finite_number_pass_through() {
        assert!(unit("ft").from_si(f64::NAN).is_nan());
        assert_eq!(unit("ft").from_si(f64::INFINITY), f64::INFINITY);
        assert!(unit("degF").to_si(f64::NAN).is_nan());
    }
}
