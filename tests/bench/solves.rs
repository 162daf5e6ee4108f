//! `cargo bench --bench solves`: how long the solvers take, as ratios to factorising and solving a dense system of the same
//! size with the library nalgebra, on the same machine in the same run. Ends with a failure where a ratio is over its most.

use engine::numeric::Factorised;
use engine::quantity::{Angle, Length, Typed};
use engine::section::{Panels, section_points};
use engine::wing::{LiftingSurfaces, Stations};
use nalgebra::{DMatrix, DVector};
use std::hint::black_box;
use std::process::ExitCode;
use std::time::Instant;

/// Rounds, of which the quickest counts: a load on the machine makes all others slower.
const ROUNDS: usize = 15;

/// Seconds of the quickest round of each of two, taken in turn so that a load falls on both.
fn quickest(mut ours: impl FnMut(), mut theirs: impl FnMut()) -> (f64, f64) {
    let time = |work: &mut dyn FnMut()| {
        let start = Instant::now();
        work();
        start.elapsed().as_secs_f64()
    };
    (0..ROUNDS).fold((f64::INFINITY, f64::INFINITY), |best, _| {
        (best.0.min(time(&mut ours)), best.1.min(time(&mut theirs)))
    })
}

/// A dense system like that of panels: large near the diagonal, falling off with the distance.
fn system(size: usize) -> (DMatrix<f64>, DVector<f64>) {
    let entry = |i: usize, j: usize| {
        let apart = i.abs_diff(j) as f64;
        1.0 / (1.0 + apart) + 0.01 * ((i * 7 + j * 13) % 11) as f64
    };
    (
        DMatrix::from_fn(size, size, entry),
        DVector::from_fn(size, |i, _| (i % 5) as f64 - 1.5),
    )
}

/// The library's factors of a system, and two solutions: ours are for two right sides too.
fn library(matrix: &DMatrix<f64>, right: &DVector<f64>) {
    let factors = black_box(matrix.clone()).lu();
    black_box(factors.solve(right));
    black_box(factors.solve(right));
}

fn surface(x: f64, semispan: f64, chord: f64, height: f64) -> Stations {
    let two = |v: [f64; 2]| v.map(Length::from_si).to_vec();
    let flat = vec![Angle::from_si(0.0); 2];
    Stations {
        y: two([0.0, semispan]),
        z: two([height; 2]),
        chord: two([chord; 2]),
        x_le: two([x; 2]),
        twist: flat.clone(),
        zero_lift: flat,
        cm: vec![0.0; 2],
    }
}

fn sweep(panels: &Panels, angles: usize) {
    for step in 0..angles {
        let alpha = Angle::from_si(-0.1 + 0.2 * step as f64 / angles as f64);
        black_box(panels.at(black_box(alpha)));
    }
}

fn main() -> ExitCode {
    let contour = section_points("2412", 201);
    let (matrix, right) = system(202);
    let list: Vec<f64> = matrix.transpose().iter().copied().collect();
    let own = || {
        let factors = Factorised::new(black_box(list.clone()), 202).expect("factors");
        black_box(factors.solve(right.as_slice()));
        black_box(factors.solve(right.as_slice()));
    };
    let dense = quickest(own, || library(&matrix, &right));
    let solve = || Panels::new(black_box(&contour.x), black_box(&contour.z)).expect("a contour");
    let section = quickest(|| sweep(&solve(), 1), || library(&matrix, &right));
    let angles = quickest(|| sweep(&solve(), 50), || sweep(&solve(), 1));
    let airplane = [surface(0.0, 4.0, 1.2, 0.0), surface(4.0, 3.0, 0.9, 0.4)];
    let lay_out = || LiftingSurfaces::new(black_box(&airplane)).expect("surfaces");
    let size = lay_out().size();
    let (matrix, right) = system(size);
    let at = |surfaces: LiftingSurfaces| surfaces.at(Angle::from_si(0.05), Length::from_si(0.3));
    let lattice = quickest(
        || drop(black_box(at(lay_out()))),
        || library(&matrix, &right),
    );
    let rows = [
        ("dense system of 202, to the library's solution", dense, 1.2),
        (
            "section of 200 panels, one angle, to the library's solution",
            section,
            1.5,
        ),
        (
            "section of 200 panels, 50 angles, to one angle",
            angles,
            2.0,
        ),
        (
            "wing and tail in one lattice, to the library's solution",
            lattice,
            2.0,
        ),
    ];
    println!("lattice of wing and tail: {size} panels");
    println!(
        "{:62} {:>10} {:>10} {:>6} {:>5}",
        "what", "ours, ms", "to, ms", "ratio", "most"
    );
    let mut over = false;
    for (what, (ours, to), most) in rows {
        let ratio = ours / to;
        over |= ratio > most;
        println!(
            "{what:62} {:10.3} {:10.3} {ratio:6.2} {most:5.1}",
            ours * 1e3,
            to * 1e3
        );
    }
    ExitCode::from(u8::from(over))
}
