//! The function table held to its promises.

use super::{Compute, Entry, Gives, Parameter, Wants, entries, entry};
use crate::sheet::Sheet;
use crate::values::{EXCLUDED, NONE, is_excluded};
use engine::quantity::constants::{G0, P0, RHO0, T0};
use engine::quantity::{Dimension, SpeedKind};

fn row(name: &str) -> &'static Entry {
    entry(name).unwrap_or_else(|| panic!("a row {name}"))
}

fn parameter(function: &str, name: &str) -> &'static Parameter {
    let found = row(function).parameters.iter().find(|p| p.name == name);
    found.unwrap_or_else(|| panic!("an argument {name} of {function}"))
}

/// Works a row out with numbers in the order of its arguments; those not given take their defaults.
fn each(name: &str, given: &[f64]) -> Vec<f64> {
    let row = row(name);
    let defaults = row.parameters.iter().skip(given.len());
    let defaults = defaults.map(|p| p.default.unwrap_or(f64::NAN));
    let numbers: Vec<f64> = given.iter().copied().chain(defaults).collect();
    let texts = row.parameters.iter().map(|p| p.default_text.unwrap_or(""));
    let texts: Vec<&str> = texts.collect();
    let mut out = vec![NONE; row.fields.len()];
    let Compute::Each(compute) = row.compute else {
        panic!("{name} is not worked out condition by condition")
    };
    compute(&numbers, &texts, &mut out);
    out
}

fn lines(name: &str, given: &[&[f64]]) -> Vec<f64> {
    let row = row(name);
    let texts = vec![""; row.parameters.len()];
    let mut out = vec![Vec::new(); row.fields.len()];
    let Compute::Lines(compute) = row.compute else {
        panic!("{name} does not take whole lines")
    };
    compute(given, &texts, &mut out);
    out.into_iter().map(|line| line[0]).collect()
}

fn holds(name: &str, given: &[f64]) -> bool {
    let validity = row(name).validity;
    let validity = validity.unwrap_or_else(|| panic!("a range of {name}"));
    (validity.holds)(given)
}

#[test]
fn every_row_says_what_it_does_and_where_from() {
    for row in entries() {
        for text in [row.group, row.what, row.method, row.holds, row.source] {
            assert!(!text.trim().is_empty(), "{}", row.name);
            assert!(!text.contains("  "), "{}: {text}", row.name);
        }
        for text in [row.what, row.method, row.holds] {
            assert!(text.ends_with('.'), "{}: {text}", row.name);
        }
        for field in row.fields.iter().filter(|f| !f.name.is_empty()) {
            assert!(!field.what.is_empty(), "{}.{}", row.name, field.name);
        }
        let advice = row.validity.map_or("holds", |v| v.advice);
        assert!(advice.contains("hold") || advice.contains("coded"));
        for validity in row.validity.iter().chain(&row.trap) {
            assert!(!validity.advice.ends_with('.'), "{}", validity.advice);
            for (at, _) in validity.lines {
                assert!(row.parameters[*at].line, "{} takes no line there", row.name);
            }
        }
    }
}

#[test]
fn names_are_unique_and_in_the_manner_of_the_language() {
    let mut names: Vec<&str> = entries().map(|row| row.name).collect();
    for name in &names {
        let plain = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '_';
        assert!(name.chars().all(plain), "{name}");
        assert_eq!(entry(name).map(|found| found.name), Some(*name));
    }
    let count = names.len();
    names.sort_unstable();
    names.dedup();
    assert_eq!(names.len(), count);
    assert!(entry("no_such_function").is_none());
}

#[test]
fn rows_of_a_group_stand_together() {
    let mut groups: Vec<&str> = entries().map(|row| row.group).collect();
    groups.dedup();
    let count = groups.len();
    groups.sort_unstable();
    groups.dedup();
    assert_eq!(groups.len(), count);
}

#[test]
fn arguments_are_named_once_and_required_ones_stand_first() {
    for row in entries() {
        let optional = |p: &Parameter| p.default.is_some() || p.default_text.is_some();
        let first = row.parameters.iter().position(optional);
        let required = row.parameters.iter().rposition(|p| !optional(p));
        assert!(first.is_none() || required < first, "{}", row.name);
        for (i, p) in row.parameters.iter().enumerate() {
            let again = row.parameters.iter().skip(i + 1);
            assert!(again.clone().all(|q| q.name != p.name), "{}", row.name);
            let word = p.default_text.is_none_or(|word| p.words.contains(&word));
            assert!(word, "{}", row.name);
        }
    }
}

#[test]
fn what_the_language_works_out_has_no_fields_and_all_else_has() {
    for row in entries() {
        let language = matches!(row.compute, Compute::Language);
        assert_eq!(row.fields.is_empty(), language, "{}", row.name);
        // A function that makes points may take none.
        let lines = matches!(row.compute, Compute::Lines(_) | Compute::Prepared(_));
        assert_eq!(
            row.takes_lines() || row.makes.is_some(),
            lines,
            "{}",
            row.name
        );
        assert_eq!(
            row.makes.is_some(),
            row.fields.iter().any(|f| f.made),
            "{}",
            row.name
        );
    }
}

/// `f(a, b = 1) -> x y`, a whole line as `a*`; a default that may be left out altogether as `none`.
fn signature(row: &Entry) -> String {
    let argument = |p: &Parameter| {
        let line = if p.line { "*" } else { "" };
        let default = match (p.default, p.default_text) {
            (Some(value), _) if value.is_nan() => " = none".to_string(),
            (Some(value), _) => format!(" = {value}"),
            (None, Some(word)) => format!(" = {word}"),
            (None, None) => String::new(),
        };
        format!("{}{line}{default}", p.name)
    };
    let arguments: Vec<String> = row.parameters.iter().map(argument).collect();
    let fields: Vec<&str> = row.fields.iter().map(|f| f.name).collect();
    format!(
        "{}({}) {}",
        row.name,
        arguments.join(", "),
        fields.join(" ")
    )
}

/// The compiler holds types to the engine, but two lengths could change places: names, order and defaults stand here
/// once more, as sheets use them.
#[test]
fn names_order_and_defaults_are_what_sheets_use() {
    let rows = entries().filter(|row| !row.fields.is_empty());
    let found: Vec<String> = rows
        .map(|row| signature(row).trim_end().to_string())
        .collect();
    assert_eq!(
        found,
        [
            "standard_atmosphere(altitude, isa_deviation = 0) temperature pressure density sound_speed viscosity \
             kinematic_viscosity density_ratio pressure_ratio",
            "air_density(pressure, temperature, dew_point = none)",
            "density_altitude(density)",
            "dynamic_pressure(speed, density)",
            "dynamic_pressure_of_eas(eas)",
            "impact_pressure(mach, pressure)",
            "tas_of_eas(eas, density)",
            "eas_of_tas(tas, density)",
            "eas_of_cas(cas, pressure)",
            "cas_of_eas(eas, pressure)",
            "mach_number(speed, sound_speed)",
            "reynolds_number(speed, length, kinematic_viscosity)",
            "planform(y*, chord*, x_le*) area span aspect_ratio taper mean_chord mac y_mac x_le_mac x_quarter_mac sweep_quarter",
            "tail_volume(tail_area, arm, wing_area, mac)",
            "percent_mac(x, x_le_mac, mac)",
            "station_at_percent(percent, x_le_mac, mac)",
            "center_of_gravity(weight*, x*, z*) weight x z moment",
            "pitch_inertia(weight*, x*, z*, own*)",
            "pitching_moment(Cm, q, S, c)",
            "moment_coefficient(M, q, S, c)",
            "normal_coefficient(CL, CD, alpha)",
            "axial_coefficient(CL, CD, alpha)",
            "moment_coefficient_about(Cm, from, to, CN, c, CA = 0, z_from = 0, z_to = 0)",
            "moment_about(M, from, to, N, A = 0, z_from = 0, z_to = 0)",
            "rescale_coefficient(C, from_S, from_c, to_S, to_c)",
            "center_of_pressure(Cm, CN, x_ref, c)",
            "aerodynamic_center(CN*, Cm*, x_ref, c) x Cm residual",
            "thrust_moment(thrust, z_thrust, z_cg, angle = 0, x_thrust = 0, x_cg = 0)",
            "drag_moment(drag, z_drag, z_cg)",
            "thin_section(designation) alpha_zero_lift cm_quarter cl_ideal alpha_ideal lift_slope",
            "thin_section_of(x*, z*) alpha_zero_lift cm_quarter cl_ideal alpha_ideal lift_slope",
            "section_points(designation, count) x z",
            "section_flow(x*, z*, alpha) cl cm_quarter x_cp cp_min x_cp_min cp",
            "flap_effect(chord_ratio, section_factor = 1) effectiveness lift_slope moment_slope hinge_alpha hinge_delta",
            "lift_slope(aspect_ratio, section_slope = 6.283185307179586, half_chord_sweep = 0, mach = 0)",
            "elliptic_lift_slope(aspect_ratio, section_slope = 6.283185307179586)",
            "lifting_line(y*, chord*, twist*, zero_lift*, section_slope*, alpha) CL CL_alpha alpha_zero_lift CDi efficiency \
             cl cl_basic cl_additional load_share",
            "lifting_surface(y*, chord*, x_le*, twist*, zero_lift*, cm*, alpha, x_ref) area mac CL CL_alpha Cm Cm_alpha x_ac \
             CDi cl",
            "lifting_surfaces(surface*, y*, z*, chord*, x_le*, twist*, zero_lift*, cm*, alpha, x_ref) CL Cm CL_alpha \
             Cm_alpha x_np CL_surface downwash downwash_slope",
            "wing_moment(y*, chord*, x_le*, cm*, cl_basic*, cl_additional*) Cm0 x_ac",
            "schrenk_load(y*, chord*, lift)",
            "body_moment_slope(length, width, wing_area, mac, root_quarter_fraction)",
            "slender_body_moment_slope(x*, width*, flow_slope*, wing_area, mac)",
            "body_moment_zero(x*, width*, incidence*, zero_lift, wing_area, mac, fineness)",
            "downwash_slope(aspect_ratio, taper, span, sweep_quarter, tail_arm, tail_height)",
            "downwash_angle(CL, aspect_ratio)",
            "pitch_rate_angle(n, speed, arm, maneuver = pull-up)",
            "neutral_point(x_ac, slope, S, mac, x_tail, tail_slope, tail_area, downwash_slope, q_ratio = 1, \
             body_slope = 0)",
            "static_margin(x_cg, x_np, mac)",
            "control_effectiveness(chord_ratio, area_ratio = 1, section_factor = 1)",
            "tail_lift(slope, alpha, downwash, incidence, effectiveness, deflection, q, S, q_ratio = 1, zero_lift = 0, \
             pitch_angle = 0)",
            "tail_load_split(chord_ratio, load_alpha, load_delta, x_le, c) fixed movable x_cp",
            "free_control_factor(C_h_alpha, C_h_delta, effectiveness)",
            "hinge_moment(C_h0, C_h_alpha, C_h_delta, alpha, delta, q, S, c, C_h_tab = 0, tab = 0)",
            "pivot_moment(load, x_load, x_pivot, M0 = 0)",
            "stick_force(hinge_moment, gearing)",
            "balancing_load(M, n, weight, x_cg, x_ac, x_tail, M_other = 0)",
            "wing_lift(n, weight, tail_load)",
            "inertia_load(n, weight, pitch_acceleration, x, x_cg)",
            "pitch_acceleration_load(inertia, acceleration, x_tail, x_cg)",
            "stall_speed(weight, S, CL_max, density = 1.225)",
            "limit_load_factor(rule, weight, category = normal) positive negative positive_at_dive negative_at_dive flaps",
            "design_speeds(rule, weight, S, stall_speed, stall_speed_flaps, n, category = normal, level_speed = none) \
             VA VC VD VF",
            "mass_ratio(wing_loading, density, chord, slope)",
            "gust_alleviation(mass_ratio)",
            "gust_velocity(rule, speed_point, altitude = 0)",
            "gust_load_increment(rule, gust, eas, slope, wing_loading, alleviation)",
            "tail_gust_load(rule, gust, eas, tail_slope, tail_area, downwash_slope, alleviation)",
            "maneuver_pitch_acceleration(rule, limit_factor, eas) nose_up nose_down n_nose_up n_nose_down",
            "elevator_step_load(q, tail_area, tail_slope, effectiveness, deflection)",
            "load_factor_step_load(rule, dn, weight, x_cg, x_ac, arm, S, slope, tail_area, tail_slope, downwash_slope)",
            "unsymmetrical_tail_share(rule, n) greater lesser",
            "ground_gust_hinge_moment(rule, surface, weight, S, S_control, c_control)",
            "factor_of_safety(rule)",
            "fitting_factor(rule)",
            "shear_from_tip(load*, y*)",
            "bending_from_tip(load*, y*)",
            "torsion_from_tip(torque*, y*)",
            "chordwise_load(shape, load, chord, chord_ratio, x_cp = none, bay = 0) p_leading p_hinge p_trailing rib_load",
            "bag_plan(load*, y*, bag, tare* = 0, factor = 1) bags load_error shear_error bending_error",
        ]
    );
}

/// Each example runs and calls its function, and no finding has anything to say about it.
#[test]
fn every_example_runs() {
    for row in entries() {
        let text = row.example;
        let count = text.lines().count();
        assert!((2..=8).contains(&count), "{}: {count} lines", row.name);
        assert!(text.contains(&format!("{}(", row.name)), "{}", row.name);
        let sheet = Sheet::open(text);
        let findings = sheet.findings();
        let first = findings.first().map(|f| f.message.as_str());
        assert_eq!(first, None, "{}\n{text}", row.name);
        let report = sheet.report(&[]);
        assert!(!report.quantities.is_empty(), "{}", row.name);
    }
}

#[test]
fn airspeed_kinds_and_differences_come_from_the_engine() {
    assert_eq!(
        parameter("dynamic_pressure_of_eas", "eas").speed,
        Some(SpeedKind::Equivalent)
    );
    assert_eq!(
        parameter("mach_number", "speed").speed,
        Some(SpeedKind::True)
    );
    assert_eq!(parameter("mach_number", "sound_speed").speed, None);
    assert_eq!(
        row("cas_of_eas").fields[0].speed,
        Some(SpeedKind::Calibrated)
    );
    assert!(parameter("standard_atmosphere", "isa_deviation").difference);
    assert!(!parameter("air_density", "temperature").difference);
}

#[test]
fn temperatures_are_absolute_and_angles_shown_in_degrees() {
    let atmosphere = row("standard_atmosphere");
    assert!(atmosphere.is_record());
    let absolute: Vec<&str> = atmosphere
        .fields
        .iter()
        .filter(|f| f.absolute)
        .map(|f| f.name)
        .collect();
    assert_eq!(absolute, ["temperature"]);
    for (name, shown) in [
        ("downwash_angle", Some("deg")),
        ("pitch_rate_angle", Some("deg")),
        ("static_margin", Some("%")),
        ("percent_mac", Some("%")),
        ("tail_volume", None),
    ] {
        assert_eq!(row(name).fields[0].shown, shown, "{name}");
    }
}

#[test]
fn only_lift_slopes_are_suspected_of_degrees() {
    let slopes: Vec<&str> = row("neutral_point")
        .parameters
        .iter()
        .filter(|p| p.slope)
        .map(|p| p.name)
        .collect();
    assert_eq!(slopes, ["slope", "tail_slope"]);
}

#[test]
fn weights_may_be_masses() {
    let center = row("center_of_gravity");
    assert_eq!(center.parameters[0].wants, Wants::ForceOrMass);
    assert_eq!(center.fields[0].gives, Gives::Argument(0, Dimension::NONE));
    assert_eq!(
        center.fields[3].gives,
        Gives::Argument(0, Dimension::LENGTH)
    );
    assert_eq!(
        parameter("pitch_inertia", "weight").wants,
        Wants::MassOrWeight
    );
}

/// ISO 2533:1975 at sea level, and 15 K above it: the same pressure, thinner air.
#[test]
fn the_atmosphere_at_sea_level() {
    let air = each("standard_atmosphere", &[0.0]);
    assert_eq!(air[..3], [T0, P0, RHO0]);
    assert_eq!(air[6..], [1.0, 1.0]);
    let warm = each("standard_atmosphere", &[0.0, 15.0]);
    assert_eq!(warm[..2], [T0 + 15.0, P0]);
    assert!((warm[2] - RHO0 * T0 / (T0 + 15.0)).abs() < 1e-12);
}

#[test]
fn a_dew_point_that_is_not_given_leaves_dry_air() {
    assert!((each("air_density", &[P0, T0])[0] - RHO0).abs() < 1e-15);
    assert!(each("air_density", &[P0, T0, T0 - 5.0])[0] < RHO0);
}

/// Statics by hand, in numbers that are exact: every argument other, so that none can stand for another.
#[test]
fn moments_by_hand() {
    assert_eq!(
        each("pitching_moment", &[-0.05, 1531.25, 16.0, 1.5]),
        [-1837.5]
    );
    assert_eq!(
        each("moment_coefficient", &[-1837.5, 1531.25, 16.0, 1.5]),
        [-0.05]
    );
    // -0.25 + 0.5 (3 - 2)/4 - 2 (5 - 1)/4
    let all = [-0.25, 2.0, 3.0, 0.5, 4.0, 2.0, 1.0, 5.0];
    assert_eq!(each("moment_coefficient_about", &all), [-2.125]);
    assert_eq!(each("moment_coefficient_about", &all[..5]), [-0.125]);
    // -300 + 4000 (2.25 - 2) - 100 (3 - 1)
    let all = [-300.0, 2.0, 2.25, 4000.0, 100.0, 1.0, 3.0];
    assert_eq!(each("moment_about", &all), [500.0]);
    assert_eq!(each("moment_about", &all[..4]), [700.0]);
    assert_eq!(
        each("rescale_coefficient", &[0.5, 8.0, 2.0, 16.0, 4.0]),
        [0.125]
    );
    assert_eq!(each("center_of_pressure", &[-0.5, 0.25, 1.0, 2.0]), [5.0]);
    assert_eq!(each("thrust_moment", &[1000.0, 0.5, 0.25]), [-250.0]);
    assert_eq!(each("drag_moment", &[800.0, 0.5, 0.25]), [200.0]);
    assert_eq!(each("normal_coefficient", &[0.8, 0.03, 0.0]), [0.8]);
    assert_eq!(each("axial_coefficient", &[0.8, 0.03, 0.0]), [0.03]);
}

/// A thrust line tilted straight up leaves only its lift: T (x_cg - x_thrust).
#[test]
fn a_tilted_thrust_needs_its_stations() {
    let quarter = std::f64::consts::FRAC_PI_2;
    let moment = each("thrust_moment", &[1000.0, 0.5, 0.25, quarter, 0.5, 2.0]);
    assert!((moment[0] - 1500.0).abs() < 1e-9);
}

/// Moments about x_ac by hand, and the remaining forces.
#[test]
fn the_balance_by_hand() {
    // (-900 + 2*5000*(2.5 - 2))/(6 - 2), and 100 N.m more
    let given = [-900.0, 2.0, 5000.0, 2.5, 2.0, 6.0];
    assert_eq!(each("balancing_load", &given), [1025.0]);
    let with_other: Vec<f64> = given.into_iter().chain([100.0]).collect();
    assert_eq!(each("balancing_load", &with_other), [1050.0]);
    assert_eq!(each("wing_lift", &[2.0, 5000.0, 1025.0]), [8975.0]);
    // -400 (2.5 - g0 (3 - 2)/g0)
    assert_eq!(each("inertia_load", &[2.5, 400.0, G0, 3.0, 2.0]), [-600.0]);
    assert_eq!(
        each("pitch_acceleration_load", &[800.0, 3.0, 6.0, 2.0]),
        [-600.0]
    );
}

#[test]
fn tail_and_chord_by_hand() {
    assert_eq!(each("tail_volume", &[2.0, 4.5, 12.0, 1.5]), [0.5]);
    assert_eq!(each("percent_mac", &[2.5, 2.0, 1.25]), [0.4]);
    assert_eq!(each("station_at_percent", &[0.4, 2.0, 1.25]), [2.5]);
    assert_eq!(each("static_margin", &[2.0, 2.25, 1.25]), [0.2]);
    assert_eq!(each("downwash_angle", &[std::f64::consts::PI, 4.0]), [0.5]);
    // t = 1*(3/12)*4*(1 - 0.5) = 0.5; 2 + (0.5*(6 - 2))/(3.5 + 0.5)
    let given = [2.0, 3.5, 12.0, 1.5, 6.0, 4.0, 3.0, 0.5];
    assert_eq!(each("neutral_point", &given), [2.5]);
    // t = 0.5 as before; 2 + (2 - 0.5*1.5)/4 with the body
    let body: Vec<f64> = given.into_iter().chain([1.0, 0.5]).collect();
    assert_eq!(each("neutral_point", &body), [2.3125]);
}

#[test]
fn the_manoeuvre_is_chosen_by_a_word() {
    assert_eq!(each("pitch_rate_angle", &[3.0, 10.0, 5.0]), [G0 / 10.0]);
    let Compute::Each(compute) = row("pitch_rate_angle").compute else {
        panic!("condition by condition")
    };
    let mut out = [0.0];
    compute(&[2.0, 10.0, 5.0, NONE], &["", "", "", "turn"], &mut out);
    assert_eq!(out, [1.5 * G0 * 5.0 / 100.0]);
    compute(&[2.0, 10.0, 5.0, NONE], &["", "", "", "loop"], &mut out);
    assert!(out[0].is_nan());
}

#[test]
fn airspeeds_and_pressures() {
    assert_eq!(each("dynamic_pressure", &[50.0, 1.225]), [1531.25]);
    assert_eq!(each("dynamic_pressure_of_eas", &[50.0]), [1531.25]);
    assert_eq!(each("tas_of_eas", &[60.0, RHO0 / 4.0]), [120.0]);
    assert_eq!(each("eas_of_tas", &[120.0, RHO0 / 4.0]), [60.0]);
    assert_eq!(each("mach_number", &[85.0, 340.0]), [0.25]);
    assert_eq!(each("reynolds_number", &[50.0, 2.0, 0.25]), [400.0]);
    assert_eq!(each("density_altitude", &[RHO0]), [0.0]);
    // The isentropic relation at Mach 0.5: p (1.05^3.5 - 1).
    let impact = each("impact_pressure", &[0.5, P0])[0];
    assert!((impact - 18_868.0).abs() < 1.0, "{impact}");
    for eas in [20.0, 60.0, 120.0] {
        let cas = each("cas_of_eas", &[eas, 70_000.0])[0];
        assert!(cas > eas);
        assert!((each("eas_of_cas", &[cas, 70_000.0])[0] - eas).abs() < 1e-10);
    }
}

#[test]
fn items_by_hand() {
    let (w, x, z) = ([300.0, 100.0], [2.0, 3.0], [0.0, 0.4]);
    assert_eq!(
        lines("center_of_gravity", &[&w, &x, &z]),
        [400.0, 2.25, 0.1, 900.0]
    );
    let (m, own) = ([10.0, 10.0], [0.0, 2.0]);
    let inertia = lines("pitch_inertia", &[&m, &[1.0, 3.0], &[0.5, 0.5], &own]);
    assert_eq!(inertia, [22.0]);
}

/// A point left out on purpose is no point; one that is missing otherwise leaves no result.
#[test]
fn points_left_out_on_purpose_do_not_count() {
    let (x_ref, c) = ([0.25], [1.0]);
    let polar = |last: f64| {
        let cm = [-0.040, -0.024, last];
        lines("aerodynamic_center", &[&[0.2, 1.0, 1.4], &cm, &x_ref, &c])
    };
    let center = polar(EXCLUDED);
    assert!((center[0] - 0.23).abs() < 1e-12 && (center[1] + 0.044).abs() < 1e-12);
    assert!(center[2] < 1e-15);
    assert!(polar(-0.1)[2] > 0.01);
    assert!(polar(NONE).iter().all(|v| v.is_nan() && !is_excluded(*v)));

    let cg = lines(
        "center_of_gravity",
        &[
            &[300.0, EXCLUDED, 100.0],
            &[2.0, 9.0, 3.0],
            &[0.0, 9.0, 0.4],
        ],
    );
    assert_eq!(cg, [400.0, 2.25, 0.1, 900.0]);
}

#[test]
fn ranges_hold_inside_and_end_where_they_say() {
    for (name, inside, outside) in [
        (
            "standard_atmosphere",
            &[-2000.0, 0.0][..],
            &[32_001.0, 0.0][..],
        ),
        ("air_density", &[P0, T0, f64::NAN], &[P0, T0, 230.0]),
        ("air_density", &[P0, T0, T0], &[P0, T0, T0 + 1.0]),
        ("density_altitude", &[1.478], &[1.48]),
        ("density_altitude", &[0.01323], &[0.0132]),
        ("impact_pressure", &[1.0, P0], &[1.001, P0]),
        ("eas_of_cas", &[340.2, P0], &[340.4, P0]),
        ("cas_of_eas", &[100.0, P0], &[100.0, 0.0]),
        ("tas_of_eas", &[50.0, 1.0], &[50.0, 0.0]),
        ("reynolds_number", &[0.0, 1.0, 1e-5], &[-1.0, 1.0, 1e-5]),
        ("percent_mac", &[1.0, 0.5, 1.2], &[1.0, 0.5, -1.2]),
        (
            "pitching_moment",
            &[-0.1, 0.0, 12.0, 1.2],
            &[-0.1, -1.0, 12.0, 1.2],
        ),
        (
            "center_of_pressure",
            &[-0.1, 0.2, 0.3, 1.0],
            &[-0.1, 0.0, 0.3, 1.0],
        ),
        ("downwash_angle", &[0.5, 6.0], &[0.5, 0.0]),
    ] {
        assert!(holds(name, inside), "{name} {inside:?}");
        assert!(!holds(name, outside), "{name} {outside:?}");
    }
}

/// What a sheet sees of a part of the chord given as a bare percentage, and of a word that is none.
#[test]
fn impossible_arguments_are_refused() {
    for (text, code) in [
        ("x = station_at_percent(25, 2 m, 1.4 m)\n", "argument-range"),
        (
            "a = pitch_rate_angle(2, 50 m/s, 4 m, \"loop\")\n",
            "unknown-word",
        ),
        ("a = pitch_rate_angle(2, 50 m/s, 4 m, 3)\n", "wrong-kind"),
    ] {
        let findings = Sheet::open(text).findings();
        let codes: Vec<&str> = findings.iter().map(|f| f.code).collect();
        assert_eq!(codes, [code], "{text}");
    }
    for text in [
        "x = station_at_percent(1.5, 2 m, 1.4 m)\n",
        "x = station_at_percent(160 %, 2 m, 1.4 m)\n",
        "a = pitch_rate_angle(2, 50 m/s, 4 m, \"turn\")\n",
    ] {
        assert!(Sheet::open(text).findings().is_empty(), "{text}");
    }
}
