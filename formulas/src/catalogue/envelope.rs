//! Rules of the envelope. A set of rules that a function does not have is none of its words, and so no guess.

use super::macros::{
    Argument, at, each, entry, field, lift_slope, parameter, positive, put, within,
};
use super::row::{Compute, Entry, Parameter, Wants};
use engine::envelope::{self, Category, Rule, SpeedPoint, Surface};
use engine::quantity::{
    Angle, AngularAcceleration, Area, EquivalentAirspeed, Force, Length, MassDensity, PerAngle,
    Pressure, Torque, Typed, Velocity,
};

const GROUP: &str = "Rules of the envelope";
const PART_23: &str = Rule::Part23.word();
const CS_VLA: &str = Rule::CsVla.word();
const F2245: &str = Rule::F2245.word();
const CS_22: &str = Rule::Cs22.word();
const STATED: &str = Rule::Stated.word();

/// The set of rules, one of those that the function has.
const fn rule(words: &'static [&'static str]) -> Parameter {
    word("rule", words)
}

/// An argument that is one of some words.
const fn word(name: &'static str, words: &'static [&'static str]) -> Parameter {
    Parameter {
        name,
        wants: Wants::Text,
        words,
        ..<f64 as Argument>::PARAMETER
    }
}

const CATEGORY: Parameter = Parameter {
    default_text: Some(Category::Normal.word()),
    ..word(
        "category",
        &[
            Category::Normal.word(),
            Category::Utility.word(),
            Category::Acrobatic.word(),
            Category::Commuter.word(),
        ],
    )
};

const SPEED_POINT: Parameter = word(
    "speed_point",
    &[
        SpeedPoint::VB.word(),
        SpeedPoint::VC.word(),
        SpeedPoint::VD.word(),
        SpeedPoint::VF.word(),
    ],
);

const SURFACE: Parameter = word(
    "surface",
    &[
        Surface::Elevator.word(),
        Surface::Rudder.word(),
        Surface::Aileron.word(),
        Surface::AileronFullThrow.word(),
    ],
);

/// The word of an argument.
fn text<'a>(texts: &[&'a str], index: usize) -> &'a str {
    texts.get(index).copied().unwrap_or("")
}

/// The argument of that index as a quantity.
fn get<T: Typed>(given: &[f64], index: usize) -> T {
    T::from_si(at(given, index))
}

/// Works a function of a set of rules out; a word that is none leaves no value.
fn by_rule<const N: usize>(
    texts: &[&str],
    out: &mut [f64],
    values: impl FnOnce(Rule) -> Option<[f64; N]>,
) {
    match Rule::of_word(text(texts, 0)).and_then(values) {
        Some(values) => put(out, &values),
        None => out.fill(f64::NAN),
    }
}

pub(super) static ROWS: &[Entry] = &[
    within(
        |given| positive(given, [0, 1, 2, 3]),
        "the method holds for a weight above 0 N, an area above 0 m^2, a lift coefficient above 0 and a density above \
         0 kg/m^3",
        each!(GROUP, envelope::stall_speed(weight: Force, S: Area, CL_max: f64,
                density: MassDensity = engine::quantity::constants::RHO0) -> Velocity;
            "Stalling speed at a load factor of 1.",
            "sqrt(2 weight/(density S CL_max)). CL_max is that of the trimmed airplane, tail load within. With the density \
             of sea level it is an equivalent airspeed.",
            "Everywhere, as a definition.",
            "definition of the lift coefficient",
            "W [lb] = 560 ; weighing report\n\
             V_S [KEAS] = stall_speed(W, 142 ft^2, 1.55)\n"),
    ),
    within(
        |given| positive(given, [1]),
        "the method holds for a weight above 0 N",
        entry!(GROUP, limit_load_factor,
            &[rule(&[PART_23, CS_VLA, F2245, CS_22]), parameter!(weight: Force), CATEGORY],
            &[
                field!("positive", f64, "positive limit load factor"),
                field!("negative", f64, "negative, at the cruising speed (CS-22: manoeuvring speed)"),
                field!("positive_at_dive", f64, "positive, at the dive speed"),
                field!("negative_at_dive", f64, "negative, at the dive speed"),
                field!("flaps", f64, "positive, flaps extended"),
            ],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let category = Category::of_word(text(texts, 2))?;
                let n = envelope::limit_load_factor(rule, get(given, 1), category);
                Some([n.positive, n.negative, n.positive_at_dive, n.negative_at_dive, n.flaps])
            }));
            "Limit manoeuvring load factors of a set of rules, the least allowed.",
            "14 CFR 23.337, 23.333(b), 23.345(a): 2.1 + 24,000/(W + 10,000), W in pounds, at most 3.8, utility 4.4, \
             acrobatic 6; negative 0.4 of it, acrobatic 0.5. CS-VLA 337, 333(b), 345(a): 3.8 and -1.5. F2245: 4 and -2, \
             others not coded. CS 22.337, 22.345: utility 5.3 and -2.65, acrobatic 7 and -5. weight is the design maximum.",
            "A category that the set has: CS-VLA and F2245 normal, CS-22 utility and acrobatic.",
            "14 CFR 23.333, 23.337, 23.345 before amendment 64; CS-VLA 333, 337, 345; ASTM F2245; CS 22.337, 22.345",
            "W [lb] = 560 ; weighing report\n\
             n_limit = limit_load_factor(\"14 CFR 23\", W, \"utility\")\n\
             n_1 = n_limit.positive\n"),
    ),
    within(
        |given| positive(given, [1, 2, 3, 4, 5]) && at(given, 1) / at(given, 2) <= 4788.1,
        "the rules hold for weight, area, stalling speeds and load factor above 0 and a wing loading up to 4788 N/m^2 \
         (100 lb/ft^2)",
        entry!(GROUP, design_speeds,
            &[
                rule(&[PART_23, CS_VLA]),
                parameter!(weight: Force),
                parameter!(S: Area),
                parameter!(stall_speed: EquivalentAirspeed),
                parameter!(stall_speed_flaps: EquivalentAirspeed),
                parameter!(n: f64),
                CATEGORY,
                parameter!(level_speed: EquivalentAirspeed = f64::NAN),
            ],
            &[
                field!("VA", EquivalentAirspeed, "manoeuvring speed"),
                field!("VC", EquivalentAirspeed, "design cruising speed"),
                field!("VD", EquivalentAirspeed, "design dive speed"),
                field!("VF", EquivalentAirspeed, "flap speed"),
            ],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let category = Category::of_word(text(texts, 6))?;
                let v = envelope::design_speeds(rule, get(given, 1), get(given, 2), get(given, 3), get(given, 4),
                    at(given, 5), category, get(given, 7));
                Some([v.VA.si(), v.VC.si(), v.VD.si(), v.VF.si()])
            }));
            "Design speeds of a set of rules, equivalent airspeeds, the least allowed.",
            "VC: 33 sqrt(W/S) kt, acrobatic 36, W/S in lb/ft^2, falling above 20 (14 CFR 23); 2.4 sqrt(W/S) m/s, W/S in \
             N/m^2 (CS-VLA); at most 0.9 level_speed. VD: the greater of 1.25 VC and 1.40 VC, utility 1.50, acrobatic 1.55. \
             VA: stall_speed sqrt(n), at most VC; with a higher VC, at most that. VF: the greater of 1.4 stall_speed and \
             1.8 stall_speed_flaps. Stalling speeds at the design maximum weight.",
            "Wing loadings up to 100 lb/ft^2. CS-VLA has the normal category only.",
            "14 CFR 23.335, 23.345 before amendment 64; CS-VLA 335, 345",
            "W [lb] = 560 ; weighing report\n\
             V_S [KEAS] = stall_speed(W, 142 ft^2, 1.55)\n\
             V_SF [KEAS] = stall_speed(W, 142 ft^2, 1.9)\n\
             speed = design_speeds(\"CS-VLA\", W, 142 ft^2, V_S, V_SF, 3.8)\n\
             V_D [KEAS] = speed.VD\n"),
    ),
    within(
        |given| positive(given, [0, 1, 2, 3]),
        "the method holds for a wing loading, a density, a chord and a lift slope above 0",
        each!(GROUP, envelope::mass_ratio(wing_loading: Pressure, density: MassDensity, chord: Length,
                @lift_slope slope: PerAngle) -> f64;
            "Mass ratio of the airplane in a gust.",
            "2 (W/S)/(rho c a g0): wing loading a force per area at the weight of the condition, chord the mean geometric \
             one, wing area over span, density that of the altitude. The slope is the airplane's where wing and tail are \
             gusted together, the wing's where the tail's gust load is a condition of its own.",
            "Everywhere, as a definition.",
            "14 CFR 23.341(c) before amendment 64; K. G. Pratt, NACA TN 2964 (1953)",
            "W [lb] = 560 ; weighing report\n\
             mu = mass_ratio(W/142 ft^2, rho0, 4.5 ft, 4.6 /rad)\n"),
    ),
    within(
        |given| positive(given, [0]),
        "the method holds for a mass ratio above 0",
        each!(GROUP, envelope::gust_alleviation(mass_ratio: f64) -> f64;
            "Gust alleviation factor.",
            "0.88 mu/(5.3 + mu).",
            "A rigid airplane free to rise but not to pitch, in a gust that grows over 12.5 chords, below the speed of sound.",
            "14 CFR 23.341(c) before amendment 64; CS-VLA 341; CS 22.341; K. G. Pratt, NACA TN 2964 (1953)",
            "mu = 6.2 ; mass ratio of the condition\n\
             K_g = gust_alleviation(mu)\n"),
    ),
    within(
        |given| at(given, 2) <= 15_240.000_1,
        "the rules hold for altitudes up to 15,240 m (50,000 ft)",
        entry!(GROUP, gust_velocity,
            &[rule(&[PART_23, CS_VLA, F2245, CS_22]), SPEED_POINT, parameter!(altitude: Length = 0.0)],
            &[field!("", Velocity, "")],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let point = SpeedPoint::of_word(text(texts, 1))?;
                Some([envelope::gust_velocity(rule, point, get(given, 2)).si()])
            }));
            "Gust velocity of a set of rules, without sign: it is to be met upward and downward.",
            "14 CFR 23.333(c), 23.345(a): 50 ft/s at VC, 25 at VD and VF, 66 at VB of the commuter category; at VB, VC and \
             VD from 20,000 ft on linear to 38, 25 and 12.5 ft/s at 50,000 ft. CS-VLA 333(c), 345(a): 15.24 and 7.62 m/s. \
             F2245: 15 and 7.5 m/s. CS 22.333, 22.345: 15 m/s at VB, 7.5 at VD and VF.",
            "A speed that the set has. The altitude counts in 14 CFR 23 only.",
            "14 CFR 23.333, 23.345 before amendment 64; CS-VLA 333, 345; ASTM F2245; CS 22.333, 22.345",
            "U = gust_velocity(\"14 CFR 23\", \"VC\", 8000 ft)\n\
             dn = gust_load_increment(\"14 CFR 23\", U, 65 KEAS, 4.6 /rad, 4 lb/ft^2, 0.48)\n"),
    ),
    within(
        |given| positive(given, [2, 3, 4, 5]) && at(given, 5) <= 1.0,
        "the method holds for a speed, a lift slope and a wing loading above 0 and an alleviation factor above 0, at most 1",
        entry!(GROUP, gust_load_increment,
            &[
                rule(&[PART_23, CS_VLA, CS_22, STATED]),
                parameter!(gust: Velocity),
                parameter!(eas: EquivalentAirspeed),
                lift_slope(parameter!(slope: PerAngle)),
                parameter!(wing_loading: Pressure),
                parameter!(alleviation: f64),
            ],
            &[field!("", f64, "")],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let (gust, eas, slope) = (get(given, 1), get(given, 2), get(given, 3));
                Some([envelope::gust_load_increment(rule, gust, eas, slope, get(given, 4), at(given, 5))])
            }));
            "Increment of the load factor in a gust, to be added to 1.",
            "14 CFR 23.341(c): K U V a/(498 W/S) in ft/s, kt and lb/ft^2, the rule's own rounding of 498.54. CS-VLA 341, \
             CS 22.341 and \"stated\": rho0 V a K U/(2 W/S). The gust upward positive, the slope as in mass_ratio, \
             alleviation 1 for a sharp-edged gust. CS 22.341(b) is not applied.",
            "Below the stall; a canard or tandem wing asks for a rational analysis.",
            "14 CFR 23.341 before amendment 64; CS-VLA 341; CS 22.341",
            "U [ft/s] = 50 ; 23.333(c)\n\
             K_g = gust_alleviation(6.2)\n\
             n = 1 + gust_load_increment(\"14 CFR 23\", U, 65 KEAS, 4.6 /rad, 3.94 lb/ft^2, K_g)\n"),
    ),
    within(
        |given| positive(given, [2, 3, 4, 6]) && at(given, 6) <= 1.0 && at(given, 5) < 1.0,
        "the method holds for a speed, a tail slope and a tail area above 0, a downwash slope below 1 and an alleviation \
         factor above 0, at most 1",
        entry!(GROUP, tail_gust_load,
            &[
                rule(&[PART_23, CS_VLA, CS_22, STATED]),
                parameter!(gust: Velocity),
                parameter!(eas: EquivalentAirspeed),
                lift_slope(parameter!(tail_slope: PerAngle)),
                parameter!(tail_area: Area),
                parameter!(downwash_slope: f64),
                parameter!(alleviation: f64),
            ],
            &[field!("", Force, "")],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let (gust, eas, slope, area) = (get(given, 1), get(given, 2), get(given, 3), get(given, 4));
                let (downwash, relief) = (at(given, 5), at(given, 6));
                Some([envelope::tail_gust_load(rule, gust, eas, slope, area, downwash, relief).si()])
            }));
            "Increment of the tail load in a gust, up positive.",
            "14 CFR 23.425(d): K U V a_t S_t (1 - downwash_slope)/498 in ft/s, kt and lb. CS-VLA 425, CS 22.425 and \
             \"stated\": rho0 K U V a_t S_t (1 - downwash_slope)/2. The gust upward positive; it is added to the balancing \
             load of steady level flight.",
            "A tail aft of the wing. A canard or tandem wing asks for a rational analysis, 14 CFR 23.341(b).",
            "14 CFR 23.425 before amendment 64; CS-VLA 425; CS 22.425",
            "U [ft/s] = 50 ; 23.333(c)\n\
             dP [lb] = tail_gust_load(\"14 CFR 23\", U, 65 KEAS, 3.6 /rad, 24 ft^2, 0.4, 0.48)\n"),
    ),
    within(
        |given| at(given, 1) >= 1.5 && at(given, 2) > 0.0,
        "the rules hold for limit load factors of 1.5 or more and speeds above 0 m/s",
        entry!(GROUP, maneuver_pitch_acceleration,
            &[rule(&[PART_23, CS_VLA]), parameter!(limit_factor: f64), parameter!(eas: EquivalentAirspeed)],
            &[
                field!("nose_up", AngularAcceleration, "nose-up pitch acceleration, positive"),
                field!("nose_down", AngularAcceleration, "nose-down pitch acceleration, negative"),
                field!("n_nose_up", f64, "load factor at the nose-up acceleration"),
                field!("n_nose_down", f64, "load factor at the nose-down acceleration"),
            ],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let a = envelope::maneuver_pitch_acceleration(rule, at(given, 1), get(given, 2));
                Some([a.nose_up.si(), a.nose_down.si(), a.n_nose_up, a.n_nose_down])
            }));
            "Pitch accelerations of the checked manoeuvre above the manoeuvring speed.",
            "14 CFR 23.423(b): (39/V) n (n - 1.5), V in kt. CS-VLA 423(b): (20.1/V) n (n - 1.5), V in m/s. Nose up at a \
             load factor of 1, nose down at the limit factor n; the tail load of each is the balancing load there and \
             what pitch_acceleration_load gives.",
            "The checked manoeuvre of these paragraphs, above VA.",
            "14 CFR 23.423(b) before amendment 64; CS-VLA 423(b)",
            "pitch = maneuver_pitch_acceleration(\"CS-VLA\", 3.8, 65 KEAS)\n\
             dP [lb] = pitch_acceleration_load(310 slug.ft^2, pitch.nose_up, 17.3 ft, 6.2 ft)\n"),
    ),
    within(
        |given| positive(given, [1, 2]) && at(given, 0) >= 0.0,
        "the method holds for a dynamic pressure not below 0 Pa, and a tail area and slope above 0",
        each!(GROUP, envelope::elevator_step_load(q: Pressure, tail_area: Area, @lift_slope tail_slope: PerAngle,
                effectiveness: f64, deflection: Angle) -> Force;
            "Increment of the tail load by a sudden elevator movement, up positive.",
            "q S_t a_t effectiveness deflection, trailing edge down positive; the airplane has not yet begun to move. The \
             deflection goes to the stops, or to what the pilot's effort gives.",
            "Linear lift, below the stall of the tail.",
            "linear aerodynamics; asked for by 14 CFR 23.423(a) before amendment 64, CS-VLA 423(a), AMC 22.423",
            "q = dynamic_pressure_of_eas(50 KEAS)\n\
             dP [lb] = elevator_step_load(q, 24 ft^2, 3.6 /rad, 0.6, -25 deg)\n"),
    ),
    within(
        |given| positive(given, [2, 5, 6, 7, 8, 9]) && at(given, 10) < 1.0,
        "the method holds for a weight, an arm aft of the centre of gravity, areas and slopes above 0 and a downwash slope \
         below 1",
        entry!(GROUP, load_factor_step_load,
            &[
                rule(&[CS_VLA, CS_22, STATED]),
                parameter!(dn: f64),
                parameter!(weight: Force),
                parameter!(x_cg: Length),
                parameter!(x_ac: Length),
                parameter!(arm: Length),
                parameter!(S: Area),
                lift_slope(parameter!(slope: PerAngle)),
                parameter!(tail_area: Area),
                lift_slope(parameter!(tail_slope: PerAngle)),
                parameter!(downwash_slope: f64),
            ],
            &[field!("", Force, "")],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let load = envelope::load_factor_step_load(rule, at(given, 1), get(given, 2), get(given, 3),
                    get(given, 4), get(given, 5), get(given, 6), get(given, 7), get(given, 8), get(given, 9),
                    at(given, 10));
                Some([load.si()])
            }));
            "Increment of the tail load that changes the load factor by dn, up positive.",
            "dn W [(x_cg - x_ac)/arm - (S_t/S)(a_t/a)(1 - downwash_slope) - (rho0/2) S_t a_t arm/m], with x_ac of the \
             airplane less tail: static moment, lift that the tail gains by angle of attack, damping of the pitch rate. \
             Speed and attitude do not change; inertia reacts the load.",
            "A tail aft of the wing, linear lift.",
            "CS-VLA 423(d); AMC 22.423",
            "W [lb] = 560 ; weighing report\n\
             l_t [ft] = 11.0 ; centre of gravity to the tail\n\
             dP [lb] = load_factor_step_load(\"CS-VLA\", 2.8, W, 6.3 ft, 6.1 ft, l_t, 142 ft^2, 4.6 /rad, 24 ft^2, \
             3.6 /rad, 0.4)\n"),
    ),
    within(
        |given| at(given, 1) >= 1.0,
        "the rules hold for positive limit load factors of 1 or more",
        entry!(GROUP, unsymmetrical_tail_share,
            &[rule(&[PART_23, CS_VLA]), parameter!(n: f64)],
            &[
                super::macros::percent(field!("greater", f64, "share on the side of the greater load")),
                super::macros::percent(field!("lesser", f64, "share on the other side")),
            ],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let share = envelope::unsymmetrical_tail_share(rule, at(given, 1));
                Some([share.greater, share.lesser])
            }));
            "Parts of the greatest symmetrical loading on the two sides of the horizontal tail.",
            "100 % on one side, on the other 100 - 10 (n - 1) per cent, at most 80 %; n is the positive limit load factor.",
            "Not for tails with marked dihedral, nor for those that the fin carries.",
            "14 CFR 23.427 before amendment 64; CS-VLA 427",
            "share = unsymmetrical_tail_share(\"CS-VLA\", 3.8)\n\
             P_lesser [lb] = share.lesser*60 lb\n"),
    ),
    within(
        |given| positive(given, [2, 3, 4, 5]),
        "the rules hold for a weight, areas and a chord above 0",
        entry!(GROUP, ground_gust_hinge_moment,
            &[
                rule(&[PART_23, CS_22]),
                SURFACE,
                parameter!(weight: Force),
                parameter!(S: Area),
                parameter!(S_control: Area),
                parameter!(c_control: Length),
            ],
            &[field!("", Torque, "")],
            Compute::Each(|given, texts, out| by_rule(texts, out, |rule| {
                let surface = Surface::of_word(text(texts, 1))?;
                let (weight, wing, area, chord) = (get(given, 2), get(given, 3), get(given, 4), get(given, 5));
                Some([envelope::ground_gust_hinge_moment(rule, surface, weight, wing, area, chord).si()])
            }));
            "Limit hinge moment of a control surface in a ground gust, without sign: it is to be met both ways.",
            "k q S_control c_control, area and chord aft of the hinge; k is 0.75, of ailerons at full throw 0.50. 14 CFR \
             23.415: q at 14.6 sqrt(W/S) + 14.6 ft/s, W/S in lb/ft^2, at most 88 ft/s. CS 22.415: q at 100 km/h.",
            "The surface held at its stops, gust lock or in the cockpit.",
            "14 CFR 23.415 before amendment 64; CS 22.415",
            "W [lb] = 560 ; weighing report\n\
             H [ft.lb] = ground_gust_hinge_moment(\"14 CFR 23\", \"elevator\", W, 142 ft^2, 9 ft^2, 1 ft)\n"),
    ),
    entry!(GROUP, factor_of_safety,
        &[rule(&[PART_23, CS_VLA, F2245])],
        &[field!("", f64, "")],
        Compute::Each(|_, texts, out| by_rule(texts, out, |rule| Some([envelope::factor_of_safety(rule)])));
        "Factor of safety: ultimate load over limit load.",
        "14 CFR 23.303, CS-VLA 303, F2245: 1.5.",
        "Where no special factor stands beside it.",
        "14 CFR 23.303 before amendment 64; CS-VLA 303; ASTM F2245",
        "P_limit [lb] = -70 ; largest limit load\n\
         P_ultimate [lb] = factor_of_safety(\"CS-VLA\")*P_limit\n"),
    entry!(GROUP, fitting_factor,
        &[rule(&[PART_23, CS_VLA])],
        &[field!("", f64, "")],
        Compute::Each(|_, texts, out| by_rule(texts, out, |rule| Some([envelope::fitting_factor(rule)])));
        "Fitting factor on the ultimate load of a fitting.",
        "14 CFR 23.625, CS-VLA 625: 1.15 where no limit and ultimate test simulates the actual stresses.",
        "Fittings, where they are not proven by test.",
        "14 CFR 23.625 before amendment 64; CS-VLA 625",
        "P_ultimate [lb] = -105 ; largest ultimate load\n\
         P_fitting [lb] = fitting_factor(\"CS-VLA\")*P_ultimate\n"),
];
