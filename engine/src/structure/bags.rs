//! A load test with bags: whole bags at each station, with the errors that they make.

use super::from_tip::outward;
use crate::quantity::{Force, ForcePerLength, Length, Torque, Typed};

/// Bags at the stations of one half, with their errors: placed less wanted.
#[derive(Clone, PartialEq, Debug)]
pub struct BagPlan {
    /// Whole bags at each station.
    pub bags: Vec<f64>,
    /// Error of the load at each station.
    pub load_error: Vec<Force>,
    /// Error of the shear just inboard of each station.
    pub shear_error: Vec<Force>,
    /// Error of the bending moment at each station, about it.
    pub bending_error: Vec<Torque>,
}

/// Whole bags at the stations of one half for a test load factor load - tare per span, rounded so that shear and bending
/// stay close along the whole span.
///
/// - `load`: limit load per span of one half, air load less inertia, positive in the direction in which bags pull.
/// - `y`: stations from root to tip, where the bags lie.
/// - `bag`: weight of a bag.
/// - `tare`: own weight of the structure per span, which pulls with the bags; 0 where it does not.
/// - `factor`: test load over limit load: 1 for limit, the factor of safety for ultimate load.
///
/// Method: the test load of each bay, straight between its stations, is shared between the two by statics, so that shear
/// and bending at the stations are those of the load. From the tip inward each station gets the nearest whole number of
/// bags for what is still due, the error of the stations outboard within, unless the bending error at the next station
/// inward were to be more than one bag times the bay: then of the next lower and higher number the one that leaves less.
/// So the shear error is nowhere more than one bag, and the bending error nowhere more than one bag times the widest bay.
/// That holds while the load still due is nowhere negative: bags cannot push the other way, and where the tare is more
/// than the test load, the errors say so.
///
/// NaN, no value, where the stations do not run outward or the bag weighs nothing.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::quantity::{Force, ForcePerLength, Length, Typed};
/// use engine::structure::bag_plan;
/// let load = [520.0, 430.0, 300.0, 120.0].map(ForcePerLength::from_si);
/// let y = [0.0, 1.0, 2.0, 3.0].map(Length::from_si);
/// let none = [0.0; 4].map(ForcePerLength::from_si);
/// let plan = bag_plan(&load, &y, Force::from_si(98.0), &none, 1.5);
/// assert!(plan.bags.iter().all(|bags| bags.fract() == 0.0));
/// assert!(plan.bending_error.iter().all(|error| error.si().abs() <= 98.0));
/// ```
pub fn bag_plan(
    load: &[ForcePerLength],
    y: &[Length],
    bag: Force,
    tare: &[ForcePerLength],
    factor: f64,
) -> BagPlan {
    let net = load.iter().zip(tare);
    let net: Vec<f64> = net.map(|(w, t)| factor * w.si() - t.si()).collect();
    let wanted = at_stations(&net, y);
    let mut plan = BagPlan {
        bags: vec![f64::NAN; load.len()],
        load_error: vec![Force::from_si(f64::NAN); load.len()],
        shear_error: vec![Force::from_si(f64::NAN); load.len()],
        bending_error: vec![Torque::from_si(f64::NAN); load.len()],
    };
    let weighs = bag.si() > 0.0 && bag.si().is_finite();
    if !weighs || wanted.len() != load.len() || !outward(y) {
        return plan;
    }
    let (mut shear, mut bending) = (0.0, 0.0);
    for (i, wanted) in wanted.iter().enumerate().rev() {
        let here = y.get(i).copied().map_or(0.0, Typed::si);
        let inward = i.checked_sub(1).and_then(|i| y.get(i));
        let bay = inward.map(|y| here - y.si());
        let bags = whole_bags(wanted - shear, bag.si(), bay, bending);
        let placed = bags * bag.si();
        shear += placed - wanted;
        set(&mut plan.bags, i, bags);
        set(&mut plan.load_error, i, Force::from_si(placed - wanted));
        set(&mut plan.shear_error, i, Force::from_si(shear));
        set(&mut plan.bending_error, i, Torque::from_si(bending));
        bending += shear * bay.unwrap_or(0.0);
    }
    plan
}

fn set<T>(list: &mut [T], at: usize, value: T) {
    if let Some(place) = list.get_mut(at) {
        *place = value;
    }
}

/// The load of each bay shared between its stations by statics.
fn at_stations(load: &[f64], y: &[Length]) -> Vec<f64> {
    let mut out = vec![0.0; load.len().min(y.len())];
    for (i, (load, y)) in load.windows(2).zip(y.windows(2)).enumerate() {
        if let ([inner, outer], [from, to], Some([at_inner, at_outer])) =
            (load, y, out.get_mut(i..i + 2))
        {
            let h = (*to - *from).si();
            *at_inner += h * (2.0 * inner + outer) / 6.0;
            *at_outer += h * (inner + 2.0 * outer) / 6.0;
        }
    }
    out
}

/// The nearest whole number of bags for what is still due, unless it leaves more than one bag times the bay of bending
/// error at the next station inward: then of the next lower and higher number the one that leaves less.
fn whole_bags(due: f64, bag: f64, bay: Option<f64>, bending: f64) -> f64 {
    let low = (due / bag).floor().max(0.0);
    let shear = |bags: f64| (bags * bag - due).abs();
    let nearest = if shear(low + 1.0) < shear(low) {
        low + 1.0
    } else {
        low
    };
    let bay = bay.unwrap_or(0.0);
    let error = |bags: f64| (bending + (bags * bag - due) * bay).abs();
    if bay <= 0.0 || error(nearest) <= bag * bay {
        nearest
    } else if error(low + 1.0) < error(low) {
        low + 1.0
    } else {
        low
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_abs_diff_eq, assert_relative_eq};

    fn plan(load: &[f64], y: &[f64], bag: f64, tare: f64, factor: f64) -> BagPlan {
        let per_span = |v: &f64| ForcePerLength::from_si(*v);
        let load: Vec<_> = load.iter().map(per_span).collect();
        let y: Vec<_> = y.iter().map(|v| Length::from_si(*v)).collect();
        let tare = vec![ForcePerLength::from_si(tare); load.len()];
        bag_plan(&load, &y, Force::from_si(bag), &tare, factor)
    }

    /// An elliptic load at so many stations of a half span of 4.5 m.
    fn elliptic(count: usize) -> (Vec<f64>, Vec<f64>) {
        let part = |i: usize| i as f64 / (count - 1) as f64;
        let y: Vec<f64> = (0..count).map(|i| 4.5 * part(i)).collect();
        let load = y
            .iter()
            .map(|y| 700.0 * (1.0 - (y / 4.5) * (y / 4.5)).max(0.0).sqrt());
        (load.collect(), y)
    }

    #[test]
    fn errors_stay_within_one_bag_and_one_bag_times_a_bay() {
        for count in [4, 7, 10, 19, 40] {
            for bag in [55.0, 98.0, 222.0] {
                let (load, y) = elliptic(count);
                let plan = plan(&load, &y, bag, 0.0, 1.5);
                let bay = 4.5 / (count - 1) as f64;
                let shear = plan.shear_error.iter().map(|e| e.si().abs());
                let bending = plan.bending_error.iter().map(|e| e.si().abs());
                assert!(plan.shear_error[0].si().abs() <= 0.5 * bag, "{count} {bag}");
                assert!(shear.fold(0.0, f64::max) <= bag, "{count} {bag}");
                assert!(
                    bending.fold(0.0, f64::max) <= bag * bay * 1.000_001,
                    "{count} {bag}"
                );
                assert!(plan.bags.iter().all(|b| *b >= 0.0 && b.fract() == 0.0));
            }
        }
    }

    /// Bags summed by themselves against the shear and bending of the load.
    #[test]
    fn the_errors_are_those_of_shear_and_bending() {
        let (load, y) = elliptic(10);
        let plan = plan(&load, &y, 98.0, 20.0, 1.5);
        let placed: f64 = plan.bags.iter().map(|b| b * 98.0).sum();
        let moment: f64 = plan.bags.iter().zip(&y).map(|(b, y)| b * 98.0 * y).sum();
        let net: Vec<_> = load
            .iter()
            .map(|w| ForcePerLength::from_si(1.5 * w - 20.0))
            .collect();
        let y: Vec<_> = y.iter().map(|v| Length::from_si(*v)).collect();
        let shear = super::super::shear_from_tip(&net, &y)[0].si();
        let bending = super::super::bending_from_tip(&net, &y)[0].si();
        assert_abs_diff_eq!(plan.shear_error[0].si(), placed - shear, epsilon = 1e-9);
        assert_abs_diff_eq!(plan.bending_error[0].si(), moment - bending, epsilon = 1e-9);
    }

    #[test]
    fn whole_numbers_of_bags_leave_no_error() {
        let found = plan(&[300.0, 300.0, 300.0], &[0.0, 2.0, 4.0], 100.0, 0.0, 1.0);
        assert_eq!(found.bags, [3.0, 6.0, 3.0]);
        assert!(found.bending_error.iter().all(|e| e.si() == 0.0));
        let with_tare = plan(&[300.0, 300.0, 300.0], &[0.0, 2.0, 4.0], 100.0, 200.0, 2.0);
        assert_eq!(with_tare.bags, [4.0, 8.0, 4.0]);
    }

    /// Bags on an inverted wing, by statics: n j (W - W_w) - W_w for both sides; 2884 kg for 600 kg with wings of 80 kg
    /// under 3.8 and 1.5.
    #[test]
    fn the_whole_of_an_inverted_wing() {
        let half = 9.81 * 0.5;
        let per_span = |kg: f64| kg * half / 4.5;
        let load = vec![per_span(3.8 * (600.0 - 80.0)); 10];
        let y: Vec<f64> = (0..10).map(|i| 0.5 * f64::from(i)).collect();
        let found = plan(&load, &y, 98.1, per_span(80.0), 1.5);
        let bags: f64 = found.bags.iter().sum();
        assert_relative_eq!(2.0 * bags * 98.1, 2884.0 * 9.81, epsilon = 98.1);
    }

    #[test]
    fn bags_do_not_push_and_the_errors_say_so() {
        let found = plan(&[10.0, 10.0], &[0.0, 2.0], 5.0, 30.0, 1.0);
        assert_eq!(found.bags, [0.0, 0.0]);
        assert_eq!(found.shear_error[0].si(), 40.0);
        let none = plan(&[10.0, 10.0], &[2.0, 0.0], 5.0, 0.0, 1.0);
        assert!(none.bags[0].is_nan());
        assert!(plan(&[10.0], &[0.0], 0.0, 0.0, 1.0).bags[0].is_nan());
    }
}
