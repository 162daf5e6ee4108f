//! What rests on what, and the order in which statements can be checked and worked out.

use crate::catalogue;
use crate::names::{Names, Use, located, statement_uses};
use crate::problem::{Fault, Located};
use crate::syntax::{StatementKind, Tree};

/// Unknown names for which the nearest known one is looked for.
const NEAREST_MOST: usize = 100;

/// The order of the statements, and which of them stand in a circle.
#[derive(Clone, Debug, Default)]
pub struct Order {
    /// Every statement once, those that others rest on first; otherwise in the order of the sheet.
    pub statements: Vec<usize>,
    /// For each statement, whether it stands in a circle (or is an own function that calls itself).
    pub circular: Vec<bool>,
    /// For each statement, the statements it rests on; for an `unknown` those of its bounds.
    pub rests_on: Vec<Vec<usize>>,
    /// For each statement, what the equations of an `unknown` rest on, lines that use it among them.
    pub equations: Vec<Vec<usize>>,
    /// For each symbol of `Names::symbols`, whether anything uses it.
    pub symbol_used: Vec<bool>,
    /// The statements of own functions that something calls.
    pub functions_called: Vec<usize>,
}

/// Orders the statements and reports unknown names and circles.
#[must_use]
pub fn order(tree: &Tree, names: &Names, problems: &mut Vec<Located>) -> Order {
    let mut order = Order {
        circular: vec![false; tree.statements.len()],
        symbol_used: vec![false; names.symbols.len()],
        ..Order::default()
    };
    for index in 0..tree.statements.len() {
        let edges = edges_of(tree, names, index, &mut order, problems);
        let (bounds, equations) = match &tree.statements[index].kind {
            StatementKind::Unknown(u) => (bounds_of(names, u), edges),
            _ => (edges, Vec::new()),
        };
        order.rests_on.push(bounds);
        order.equations.push(equations);
    }
    sort(tree, names, &mut order, problems);
    unknowns_that_need_each_other(tree, names, &mut order, problems);
    order
}

fn edges_of(
    tree: &Tree,
    names: &Names,
    index: usize,
    order: &mut Order,
    problems: &mut Vec<Located>,
) -> Vec<usize> {
    let statement = &tree.statements[index];
    let mut edges: Vec<usize> = Vec::new();
    let parameters: &[crate::syntax::Parameter] = match &statement.kind {
        StatementKind::Function(f) => &f.parameters,
        _ => &[],
    };
    let mut report = |used: Use<'_>| {
        let (name, span) = match used {
            Use::Symbol(name, span) | Use::Function(name, span) | Use::Axis(name, span) => {
                (name, span)
            }
        };
        if matches!(used, Use::Symbol(..)) && parameters.iter().any(|p| p.name.text == name) {
            return;
        }
        let target = match used {
            Use::Function(..) => names.function(name),
            _ => names.symbol(name).map(|s| s.statement),
        };
        match target {
            Some(target) => edges.push(target),
            None => {
                let fault = unknown(names, used, name, problems.len());
                problems.extend(fault.map(|fault| located(index, span, fault)));
            }
        }
        match used {
            Use::Function(..) => order.functions_called.extend(names.function(name)),
            _ => {
                if let Some(symbol) = names.index(name) {
                    order.symbol_used[symbol] = true;
                }
            }
        }
    };
    statement_uses(statement, &mut report);
    // The symbols that an `unknown` solves for stand in its own equations.
    if matches!(statement.kind, StatementKind::Unknown(_)) {
        edges.retain(|target| *target != index);
    }
    edges.sort_unstable();
    edges.dedup();
    edges
}

/// The statements that the bounds of an `unknown` rest on.
fn bounds_of(names: &Names, unknown: &crate::syntax::Unknown) -> Vec<usize> {
    let mut targets = Vec::new();
    for symbol in &unknown.unknowns {
        for bound in [&symbol.low, &symbol.high] {
            crate::names::uses(bound, &mut |used| match used {
                Use::Function(name, _) => targets.extend(names.function(name)),
                Use::Symbol(name, _) | Use::Axis(name, _) => {
                    targets.extend(names.symbol(name).map(|s| s.statement));
                }
            });
        }
    }
    targets.sort_unstable();
    targets.dedup();
    targets
}

/// An unknown may stand in the lines of its own equations, and use another unknown; two that need each other are a
/// circle.
fn unknowns_that_need_each_other(
    tree: &Tree,
    names: &Names,
    order: &mut Order,
    problems: &mut Vec<Located>,
) {
    let is_unknown = |s: usize| matches!(tree.statements[s].kind, StatementKind::Unknown(_));
    let unknowns: Vec<usize> = (0..tree.statements.len())
        .filter(|s| is_unknown(*s))
        .collect();
    // What each rests on by way of lines: other unknowns are noted and not entered.
    let needs: Vec<Vec<usize>> = unknowns
        .iter()
        .map(|start| {
            let mut seen = vec![false; tree.statements.len()];
            let mut open = [&order.rests_on[*start][..], &order.equations[*start]].concat();
            let mut found = Vec::new();
            while let Some(at) = open.pop() {
                if at == *start || std::mem::replace(&mut seen[at], true) {
                    continue;
                }
                match unknowns.binary_search(&at) {
                    Ok(other) => found.push(other),
                    Err(_) => open.extend(&order.rests_on[at]),
                }
            }
            found.sort_unstable();
            found
        })
        .collect();
    for start in 0..unknowns.len() {
        if let Some(chain) = way_back(&needs, start)
            && !chain.iter().all(|at| order.circular[unknowns[*at]])
        {
            let mut names_of: Vec<String> = chain
                .iter()
                .map(|at| names.of_statement(unknowns[*at]).0.to_string())
                .collect();
            names_of.extend(names_of.first().cloned());
            chain
                .iter()
                .for_each(|at| order.circular[unknowns[*at]] = true);
            let span = names.of_statement(unknowns[start]).1;
            problems.push(located(
                unknowns[start],
                span,
                Fault::Circular { chain: names_of },
            ));
        }
    }
}

/// The shortest way from a node back to itself.
fn way_back(needs: &[Vec<usize>], start: usize) -> Option<Vec<usize>> {
    let mut came_from = vec![None; needs.len()];
    let mut open = std::collections::VecDeque::from([start]);
    while let Some(at) = open.pop_front() {
        for next in &needs[at] {
            if *next == start {
                let mut chain = vec![at];
                while let Some(before) = came_from[chain[chain.len() - 1]] {
                    chain.push(before);
                }
                chain.reverse();
                return Some(chain);
            }
            if came_from[*next].is_none() {
                came_from[*next] = Some(at);
                open.push_back(*next);
            }
        }
    }
    None
}

/// What to say of a name that nothing defines; `None` for constants and catalogue functions.
fn unknown(names: &Names, used: Use<'_>, name: &str, told: usize) -> Option<Fault> {
    // Thousands of unknown names are told of without looking for what each may have meant.
    let nearest = |name: &str, known: &mut dyn Iterator<Item = &str>| {
        if told > NEAREST_MOST {
            None
        } else {
            crate::nearest::nearest(name, known)
        }
    };
    match used {
        Use::Symbol(..) if crate::check::constant(name).is_some() => None,
        Use::Symbol(..) if names.function(name).is_some() || catalogue::entry(name).is_some() => {
            Some(Fault::FunctionAsSymbol {
                name: name.to_string(),
            })
        }
        Use::Symbol(..) => {
            let twin = (told <= NEAREST_MOST)
                .then(|| {
                    let symbols = names.symbols.iter().map(|s| s.name.as_str());
                    crate::nearest::other_script(name, symbols)
                })
                .flatten();
            let other_script = twin.is_some();
            let constants = engine::quantity::constants::rows().iter().map(|c| c.name);
            let known = names
                .symbols
                .iter()
                .map(|s| s.name.as_str())
                .chain(constants);
            let nearest = twin.or_else(|| nearest(name, &mut known.into_iter()));
            Some(Fault::UnknownSymbol {
                name: name.to_string(),
                nearest,
                other_script,
            })
        }
        Use::Function(..) if catalogue::entry(name).is_some() => None,
        Use::Function(..)
            if names.symbol(name).is_some() || crate::check::constant(name).is_some() =>
        {
            Some(Fault::NotAFunction {
                name: name.to_string(),
            })
        }
        Use::Function(..) => {
            let known = catalogue::entries()
                .map(|e| e.name)
                .chain(names.function_list.iter().map(|(name, _)| name.as_str()));
            Some(Fault::UnknownFunction {
                name: name.to_string(),
                nearest: nearest(name, &mut known.into_iter()),
            })
        }
        Use::Axis(..) => {
            let known = names.axis_names();
            Some(Fault::UnknownAxis {
                name: name.to_string(),
                nearest: nearest(name, &mut known.into_iter()),
            })
        }
    }
}

/// Depth-first from the top of the sheet, without recursion: a chain may be as long as the sheet.
fn sort(tree: &Tree, names: &Names, order: &mut Order, problems: &mut Vec<Located>) {
    #[derive(Clone, Copy, PartialEq)]
    enum State {
        New,
        Open,
        Done,
    }
    let mut state = vec![State::New; tree.statements.len()];
    for start in 0..tree.statements.len() {
        if state[start] != State::New {
            continue;
        }
        let mut path: Vec<(usize, usize)> = vec![(start, 0)];
        state[start] = State::Open;
        while let Some((node, next)) = path.last_mut() {
            let node = *node;
            match order.rests_on[node].get(*next).copied() {
                Some(target) => {
                    *next += 1;
                    match state[target] {
                        State::New => {
                            state[target] = State::Open;
                            path.push((target, 0));
                        }
                        State::Open => report_circle(names, &path, target, order, problems),
                        State::Done => {}
                    }
                }
                None => {
                    state[node] = State::Done;
                    order.statements.push(node);
                    path.pop();
                }
            }
        }
    }
}

fn report_circle(
    names: &Names,
    path: &[(usize, usize)],
    target: usize,
    order: &mut Order,
    problems: &mut Vec<Located>,
) {
    let from = path
        .iter()
        .position(|(node, _)| *node == target)
        .unwrap_or(0);
    let members: Vec<usize> = path[from..].iter().map(|(node, _)| *node).collect();
    if members.iter().all(|m| order.circular[*m]) {
        return;
    }
    let mut chain: Vec<String> = members
        .iter()
        .map(|m| names.of_statement(*m).0.to_string())
        .collect();
    chain.push(names.of_statement(target).0.to_string());
    for member in &members {
        order.circular[*member] = true;
    }
    let span = names.of_statement(target).1;
    problems.push(located(target, span, Fault::Circular { chain }));
}
