//! What stands at a place: a symbol with its values, a function with its method, a unit with its factor, a word.

use super::desk::{Desk, Spot, Stretch, token_at, what_it_is};
use crate::catalogue::{self, Entry};
use crate::lex::lex;
use crate::names::{Role, Symbol};
use crate::program::{Kind, Quantity};
use crate::reference::{self, Row};
use crate::report::Scale;
use crate::span::Span;
use crate::token::{Token, TokenKind};
use crate::values::QuantityValues;
use engine::quantity::constants;
use serde::Serialize;

/// What stands at a place.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Hover {
    /// Where it stands.
    pub at: Stretch,
    /// Its name: a symbol, a call, a unit.
    pub title: String,
    /// What it is, in a sentence or less.
    pub text: String,
    /// What else is to be known of it.
    pub facts: Vec<Fact>,
}

/// A fact with its name.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Fact {
    /// `unit`, `source`.
    pub name: &'static str,
    /// What is so.
    pub text: String,
}

/// What stands at a byte of the text; `None` where there is nothing to say.
#[must_use]
pub fn hover(desk: &Desk<'_>, byte: usize) -> Option<Hover> {
    let spot = desk.spot(byte)?;
    let tokens = lex(spot.text);
    let (index, token) = token_at(&tokens, spot.at)?;
    let known = Known {
        desk,
        spot: &spot,
        tokens: &tokens,
    };
    let (span, title, text, facts) = known.at(index, token)?;
    let start = spot.statement.start;
    Some(Hover {
        at: desk.stretch(start + span.start as usize, start + span.end as usize),
        title,
        text,
        facts,
    })
}

type Said = (Span, String, String, Vec<Fact>);

struct Known<'a> {
    desk: &'a Desk<'a>,
    spot: &'a Spot<'a>,
    tokens: &'a [Token],
}

fn fact(name: &'static str, text: impl Into<String>) -> Option<Fact> {
    let text: String = text.into();
    (!text.is_empty()).then_some(Fact { name, text })
}

impl Known<'_> {
    fn at(&self, index: usize, token: Token) -> Option<Said> {
        let text = token.span.of(self.spot.text);
        match token.kind {
            TokenKind::Name => self.name(index, token.span, text),
            TokenKind::Unit | TokenKind::Bracket => unit(token.span, text),
            TokenKind::Word(_) | TokenKind::Title(_) => word(token.span, reference::row(text)?),
            TokenKind::Sign(_) => word(token.span, reference::row(text)?),
            _ => None,
        }
    }

    fn beside(&self, index: usize, step: isize) -> Option<(usize, Token)> {
        let mut at = index;
        loop {
            at = at.checked_add_signed(step)?;
            let token = *self.tokens.get(at)?;
            if token.kind != TokenKind::Blank {
                return Some((at, token));
            }
        }
    }

    fn name(&self, index: usize, span: Span, text: &str) -> Option<Said> {
        let next = self.beside(index, 1).map(|(_, t)| t.kind);
        if next == Some(TokenKind::Open)
            && let Some(said) = self.function(span, text)
        {
            return Some(said);
        }
        if self.beside(index, -1).map(|(_, t)| t.kind) == Some(TokenKind::Dot) {
            return self.field(index, span);
        }
        if next == Some(TokenKind::Colon)
            && let Some(said) = self.argument(index, span, text)
        {
            return Some(said);
        }
        if let Some(symbol) = self.desk.names.symbol(text) {
            return Some(self.symbol(span, symbol));
        }
        if let Some(row) = constants::rows().iter().find(|c| c.name == text) {
            return Some(constant(span, row));
        }
        self.function(span, text)
            .or_else(|| word(span, reference::row(text)?))
    }

    fn function(&self, span: Span, text: &str) -> Option<Said> {
        if let Some((statement, own)) = self.desk.own_function(text) {
            let parameters: Vec<&str> = own
                .parameters
                .iter()
                .map(|p| p.name.text.as_str())
                .collect();
            let title = format!("{text}({})", parameters.join(", "));
            let body = format!("own function: {}", self.desk.typed(statement, &own.body));
            let facts = [
                fact("line", statement.line.to_string()),
                fact("remark", statement.remark.as_ref().map_or("", |r| &r.text)),
            ];
            return Some((span, title, body, facts.into_iter().flatten().collect()));
        }
        let entry = catalogue::entry(text)?;
        Some((
            span,
            reference::signature(entry),
            entry.what.to_string(),
            function_facts(entry),
        ))
    }

    /// The argument that a name before a colon is, in the call around it.
    fn argument(&self, index: usize, span: Span, text: &str) -> Option<Said> {
        let mut depth = 0usize;
        let mut at = index;
        let open = loop {
            at = at.checked_sub(1)?;
            match self.tokens.get(at)?.kind {
                TokenKind::Close => depth += 1,
                TokenKind::Open if depth == 0 => break at,
                TokenKind::Open => depth -= 1,
                _ => {}
            }
        };
        let (_, called) = self.beside(open, -1)?;
        let entry = catalogue::entry(called.span.of(self.spot.text))?;
        let parameter = entry.parameters.iter().find(|p| p.name == text)?;
        let says = format!("argument of {}", entry.name);
        let facts = fact("is", reference::wanted(parameter))
            .into_iter()
            .collect();
        Some((span, reference::parameter(parameter), says, facts))
    }

    /// A field, with the names before it.
    fn field(&self, index: usize, span: Span) -> Option<Said> {
        let mut path = vec![span.of(self.spot.text).to_string()];
        let mut at = index;
        while let Some((dot, token)) = self.beside(at, -1)
            && token.kind == TokenKind::Dot
            && let Some((name, token)) = self.beside(dot, -1)
            && token.kind == TokenKind::Name
        {
            path.push(token.span.of(self.spot.text).to_string());
            at = name;
        }
        path.reverse();
        let symbol = path.join(".");
        if let Some((place, quantity)) = self.desk.quantity(&symbol) {
            return Some(self.quantity(span, &symbol, place, quantity));
        }
        let (first, rest) = path.split_first()?;
        let sheet = self.desk.sheet(first)?;
        let id = sheet.quantity(&rest.join("."))?;
        let quantity = sheet.program.quantities.get(id.0 as usize)?;
        let unit = quantity.unit.as_ref().map(|u| &*u.text);
        let facts = [
            fact("sheet", sheet.name.as_str()),
            fact("line", quantity.line.to_string()),
            fact("remark", quantity.remark.clone().unwrap_or_default()),
        ];
        let text = what_it_is(quantity.kind, unit);
        Some((span, symbol, text, facts.into_iter().flatten().collect()))
    }

    fn symbol(&self, span: Span, symbol: &Symbol) -> Said {
        if let Some((place, quantity)) = self.desk.quantity(&symbol.name) {
            return self.quantity(span, &symbol.name, place, quantity);
        }
        let line = self.desk.tree.statements.get(symbol.statement);
        let line = fact("line", line.map_or(String::new(), |s| s.line.to_string()));
        let (text, more) = match symbol.role {
            Role::Sheet => {
                let sheet = self.desk.sheet(&symbol.name);
                let name = sheet.map(|s| s.name.clone()).unwrap_or_default();
                ("another sheet".to_string(), fact("sheet", name))
            }
            _ => {
                let record = format!("{}.", symbol.name);
                let fields = self.desk.program.quantities.iter();
                let fields: Vec<&str> = fields
                    .filter_map(|q| q.symbol.strip_prefix(record.as_str()))
                    .collect();
                ("record".to_string(), fact("fields", fields.join(", ")))
            }
        };
        let facts = [more, line].into_iter().flatten().collect();
        (span, symbol.name.clone(), text, facts)
    }

    fn quantity(&self, span: Span, symbol: &str, place: usize, quantity: &Quantity) -> Said {
        let unit = quantity.unit.as_ref().map(|u| &*u.text);
        let found = self.desk.values.quantities.get(place);
        let kind = match (quantity.is_axis, quantity.input) {
            (true, _) => "axis, ",
            (_, true) => "input, ",
            _ => "",
        };
        let text = format!("{kind}{}", what_it_is(quantity.kind, unit));
        let facts = [
            fact(
                "value",
                found.map_or(String::new(), |f| self.range(quantity, f)),
            ),
            fact(
                "varies over",
                self.desk.axis_names(quantity.axes).join(", "),
            ),
            fact("remark", quantity.remark.clone().unwrap_or_default()),
            fact("line", quantity.line.to_string()),
        ];
        (
            span,
            symbol.to_string(),
            text,
            facts.into_iter().flatten().collect(),
        )
    }

    /// The value, or the smallest and the largest of several.
    fn range(&self, quantity: &Quantity, found: &QuantityValues) -> String {
        if !found.known {
            return "none".to_string();
        }
        let unit = quantity.unit.as_ref();
        let scale = Scale::of(unit, quantity.kind);
        let behind = unit.map_or(String::new(), |u| format!(" {}", u.text));
        let show = |value: f64| {
            let number = scale.number(value).unwrap_or(0.0);
            crate::numbers::shown(number, self.desk.program.digits)
        };
        let numbers = matches!(quantity.kind, Kind::Number(_));
        match (found.summary.smallest, found.summary.largest) {
            (Some(low), Some(high)) if numbers && low.value == high.value => {
                format!("{}{behind}", show(low.value))
            }
            (Some(low), Some(high)) if numbers => {
                format!("{} to {}{behind}", show(low.value), show(high.value))
            }
            _ if numbers => "none".to_string(),
            _ => String::new(),
        }
    }
}

fn function_facts(entry: &Entry) -> Vec<Fact> {
    let parameters: Vec<String> = entry.parameters.iter().map(reference::parameter).collect();
    [
        fact("arguments", parameters.join("\n")),
        fact("gives", reference::results(entry).join("\n")),
        fact("method", entry.method),
        fact("holds", entry.holds),
        fact("source", entry.source),
    ]
    .into_iter()
    .flatten()
    .collect()
}

fn unit(span: Span, text: &str) -> Option<Said> {
    let inner = text.trim_start_matches('[').trim_end_matches(']').trim();
    let (typed, _) = crate::parse::unit(inner);
    let meaning = reference::unit_meaning(&typed).ok()?;
    let names = typed.factors.iter().filter_map(|factor| {
        let rows = engine::quantity::units::rows().iter();
        let mut named = rows.filter(|row| row.symbols.contains(&factor.name.text.as_str()));
        named
            .next()
            .map(|row| format!("{}: {}; {}", factor.name.text, row.name, row.source))
    });
    let names: Vec<String> = names.collect();
    let facts = fact("made of", names.join("\n")).into_iter().collect();
    Some((span, inner.to_string(), meaning, facts))
}

fn word(span: Span, row: &Row) -> Option<Said> {
    let facts = fact("example", row.example).into_iter().collect();
    Some((span, row.form.to_string(), row.meaning.to_string(), facts))
}

fn constant(span: Span, row: &constants::ConstantRow) -> Said {
    let value = crate::report::json::plain_number(row.value);
    let value = format!("{value} {}", row.unit);
    let facts = [fact("value", value.trim_end()), fact("source", row.source)];
    (
        span,
        row.name.to_string(),
        format!("constant: {}", row.meaning),
        facts.into_iter().flatten().collect(),
    )
}
