//! Texts that no person would type: reading stays total.

use crate::lex::lex;
use crate::parse::parse;
use crate::print::print;

/// A small generator of numbers that are always the same.
struct Dice(u64);

impl Dice {
    fn roll(&mut self, below: usize) -> usize {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        (self.0 % below as u64) as usize
    }
}

const SHEET: &str = "title Osier\nS [ft^2] = 142 ; drawing\nx [ft] = 6.10 +/- 0.05\ntable point | V [KEAS] | n\nA | 55 | -3.8 ; r\n\
    B | - | 1\nend\nvary cg: fwd | aft\nW [lb] by cg = fwd: 430 | aft: 560\nvary a [deg]: -4 to 12 step 2\n\
    P [lb] = (M + n*W*(x - 2 ft))/(f(x over a) - 12 ft 6 in) at (a: 2 deg) held\n\
    unknown d [deg] between -5 and 5 such that\n  M(d) = 0 and\n  d = 1\ngoverning P, air.b over point\n\
    require P <= 2 or not S = 1 ; why\nfreebody \"B\": L @ x, couple M\nfigure \"F\": P against point each cg\n\
    f(u, v [ft]) = if u > 1 then 2 kg/m.s else if v then \"t\" else none\nuse \"s\" as g\n; prose\nnote n\n\n";

const PIECES: [&str; 72] = [
    " ",
    " ",
    " ",
    "\n",
    "\r\n",
    "\r",
    "\t",
    ";",
    "|",
    "||",
    ",",
    ":",
    "=",
    "==",
    ":=",
    "(",
    ")",
    "[",
    "]",
    "\"",
    "+",
    "-",
    "*",
    "/",
    "^",
    "<",
    ">=",
    "!=",
    "+/-",
    "±",
    "@",
    ".",
    "²",
    "⁻¹",
    "−",
    "–",
    "·",
    "“",
    "\0",
    "\u{feff}",
    "a",
    "S_1",
    "é",
    "e\u{301}",
    "1",
    "2.5",
    ".5",
    "5.",
    "1e9",
    "1,5",
    "ft",
    "kg/m",
    "/deg",
    "%",
    "°",
    "if ",
    " then ",
    " else ",
    " and ",
    "not ",
    " over ",
    " at (",
    "table ",
    "end",
    "vary ",
    "unknown ",
    "note ",
    "title ",
    " by ",
    "figure \"x\": ",
    " between ",
    "freebody \"x\": ",
];

/// What must hold for every text.
fn check(text: &str) {
    let tree = parse(text);
    let mut end = 0;
    let mut line = 1;
    for one in &tree.statements {
        assert_eq!((one.start, one.line), (end, line), "{text:?}");
        end += one.length;
        line += one.lines;
        let typed = &text[one.start..end];
        let together: String = lex(typed)
            .iter()
            .map(|token| token.span.of(typed))
            .collect();
        assert_eq!(together, typed);
        for problem in &one.problems {
            let (start, end) = (problem.span.start as usize, problem.span.end as usize);
            assert!(typed.get(start..end).is_some(), "{typed:?}: {problem:?}");
        }
    }
    assert_eq!(end, text.len());
    let printed = print(&tree, text);
    if tree.statements.iter().all(|one| one.problems.is_empty()) {
        let again = crate::print::tests::said(&parse(&printed));
        assert_eq!(
            again,
            crate::print::tests::said(&tree),
            "{text:?} {printed:?}"
        );
    }
}

#[test]
fn the_sheet_itself_is_read_whole() {
    check(SHEET);
    let troubled = parse(SHEET)
        .statements
        .into_iter()
        .filter(|one| !one.problems.is_empty())
        .count();
    // Only the advice on what stands below the line.
    assert_eq!(troubled, 1);
}

#[test]
fn any_bytes() {
    let mut dice = Dice(0x9e37_79b9_7f4a_7c15);
    for _ in 0..600 {
        let length = dice.roll(300);
        let bytes: Vec<u8> = (0..length).map(|_| dice.roll(256) as u8).collect();
        check(&String::from_utf8_lossy(&bytes));
        let plain: Vec<u8> = bytes.iter().map(|byte| byte % 95 + 32).collect();
        check(&String::from_utf8_lossy(&plain));
    }
}

#[test]
fn any_tokens() {
    let mut dice = Dice(0x2545_f491_4f6c_dd1d);
    for _ in 0..4_000 {
        let count = dice.roll(40);
        let text: String = (0..count)
            .map(|_| PIECES[dice.roll(PIECES.len())])
            .collect();
        check(&text);
        check(&format!("a = {text}"));
    }
}

#[test]
fn a_sheet_with_anything_put_in_left_out_or_cut_off() {
    let mut dice = Dice(0x1234_5678_9abc_def1);
    let places: Vec<usize> = SHEET.char_indices().map(|(at, _)| at).collect();
    for _ in 0..3_000 {
        let from = places[dice.roll(places.len())];
        let to = places[dice.roll(places.len())];
        let piece = PIECES[dice.roll(PIECES.len())];
        check(&format!("{}{piece}{}", &SHEET[..from], &SHEET[from..]));
        let (from, to) = (from.min(to), from.max(to).min(from.min(to) + 12));
        if SHEET.is_char_boundary(to) {
            check(&format!("{}{}", &SHEET[..from], &SHEET[to..]));
        }
        check(&SHEET[..from]);
    }
}

#[test]
fn time_grows_no_faster_than_the_text() {
    // Twice the text is to take about twice the time; the shapes are those that tempt a reader to look back.
    for shape in [
        "a = b +\n",
        "[",
        "\"",
        "“",
        "(",
        "|",
        "a,",
        "x by y = ",
        "table k\n",
        "table k, l | x\n,",
        "1 000 ",
        "1,1,",
        "12 ft ",
        "a/b.c ",
        ";\n",
        "vary x [ft]: 1 | ",
        "[(a/b.c)",
        "a = 1 | ",
        "f(x: -\n",
        "unknown a, ",
    ] {
        let text = shape.repeat(200_000 / shape.len());
        let start = std::time::Instant::now();
        let tree = parse(&text);
        let taken = start.elapsed();
        assert!(!tree.statements.is_empty());
        assert!(taken.as_millis() < 2_000, "{shape:?} takes {taken:?}");
    }
}

#[test]
fn deep_texts_fit_a_small_stack() {
    // Builds for development need far more of it than the released ones, which stay below a third of this.
    const STACK_BYTES: usize = 1024 * 1024;
    let read = || {
        for text in [
            format!("a = {}1{}", "(".repeat(199), ")".repeat(199)),
            format!("a = {}1{}", "f(x, ".repeat(199), ")".repeat(199)),
            format!("a = {}1", "-".repeat(199)),
            format!("a = 1{}", "^2".repeat(199)),
            format!("a = {}1", "if b then 1 else ".repeat(199)),
            format!("a = {}1{}", "(if b then 1 else ".repeat(99), ")".repeat(99)),
            format!("a = b{}", " at (x: 1)".repeat(199)),
            format!("a = 1{}", " - 1".repeat(1_999)),
            format!("a = {}", "(1 + ".repeat(100_000)),
        ] {
            let tree = parse(&text);
            let printed = print(&tree, &text);
            assert!(!printed.is_empty());
            drop(tree.clone());
            drop(tree);
        }
    };
    let thread = std::thread::Builder::new()
        .stack_size(STACK_BYTES)
        .spawn(read);
    assert!(thread.is_ok_and(|thread| thread.join().is_ok()));
}
