//! Definitions: of a symbol, by axis, and of an own function.

use super::cursor::{Cursor, Read, Unread, error, foreign};
use super::operand::unquoted;
use crate::problem::Fault;
use crate::syntax::{
    Definition, DefinitionValue, ExprKind, FunctionDefinition, ListItem, Name, Parameter,
    StatementKind, Toleranced, Words,
};
use crate::token::TokenKind;

/// One item of a list by axis: its tokens, and where its label ends.
struct Item {
    first: usize,
    /// The index of the `:` behind the label.
    colon: Option<usize>,
    end: usize,
}

impl Cursor<'_> {
    /// A line of the form of a definition of a symbol.
    ///
    /// ```text
    /// S [ft^2] = 142
    /// x_ac [ft] = 6.10 +/- 0.05
    /// W [lb] by loading = light: 430 | gross: 560
    /// n by point = 3.8 | 1 | -
    /// ```
    pub(super) fn definition(&mut self) -> Read<StatementKind> {
        let symbol = self.name("a symbol")?;
        let (unit, mut fine) = self.opt_unit_part();
        let axes = if self.eat_word("by") {
            self.names("the name of an axis")?
        } else {
            Vec::new()
        };
        fine &= self.equals()?;
        let mut value = self.right_side(axes);
        if !fine {
            spoil(&mut value);
        }
        Ok(StatementKind::Definition(Definition {
            symbol,
            unit,
            value,
        }))
    }

    /// The unit in brackets, if one stands here, and whether it could be read.
    pub(super) fn opt_unit_part(&mut self) -> (Option<crate::syntax::UnitText>, bool) {
        match self.opt_bracket() {
            Some((unit, fine)) => (Some(unit), fine),
            None => (None, true),
        }
    }

    /// `=`; a sign of another notation in its place is noted, and makes the answer false.
    pub(super) fn equals(&mut self) -> Read<bool> {
        let token = self.peek();
        if self.eat(TokenKind::Equals) {
            return Ok(true);
        }
        match token.filter(|token| super::form::is_equals(self.text, Some(token))) {
            Some(token) => {
                self.note(token.span, foreign(self.word_of(token)));
                self.bump();
                Ok(false)
            }
            None => self.expected("`=`"),
        }
    }

    fn right_side(&mut self, axes: Vec<Name>) -> DefinitionValue {
        let mut axes = axes.into_iter();
        match (axes.next(), axes.next()) {
            (Some(axis), None) => {
                let items = self.items();
                DefinitionValue::ByAxis { axis, items }
            }
            (Some(first), Some(second)) => {
                let span = first
                    .span
                    .to(axes.as_slice().last().map_or(second.span, |name| name.span));
                let names = [first, second]
                    .into_iter()
                    .chain(axes)
                    .map(|name| name.text);
                self.note(
                    span,
                    Fault::TwoAxes {
                        axes: names.collect(),
                    },
                );
                self.spoiled()
            }
            (None, _) => self.one_value(),
        }
    }

    fn spoiled(&mut self) -> DefinitionValue {
        let value = error(self.stretch(self.at, self.end));
        self.at = self.end;
        DefinitionValue::One(Toleranced {
            value,
            tolerance: None,
        })
    }

    fn one_value(&mut self) -> DefinitionValue {
        if self.peek().is_none() {
            let _: Read<()> = self.expected("a value");
            return self.spoiled();
        }
        let bars = || (self.at..self.end).filter(|at| self.is_at(*at, TokenKind::Bar));
        let lone = bars()
            .find(|at| !self.is_at(at + 1, TokenKind::Bar) && !self.is_at(at - 1, TokenKind::Bar));
        if let Some(bar) = lone.and_then(|at| self.tokens.get(at)) {
            let what = "`by` and an axis before the `=` of a list";
            self.note(
                bar.span,
                Fault::Expected {
                    what,
                    found: "|".to_owned(),
                },
            );
            return self.spoiled();
        }
        DefinitionValue::One(self.toleranced(self.end))
    }

    pub(super) fn is_at(&self, at: usize, kind: TokenKind) -> bool {
        at < self.end && self.tokens.get(at).is_some_and(|token| token.kind == kind)
    }

    /// The values of a list by axis.
    fn items(&mut self) -> Vec<ListItem> {
        let items = self.split_items();
        if let (Some(bar), true) = (self.last_bar(), items.len() > 1) {
            self.note(
                bar.span,
                Fault::Dangling {
                    sign: "|".to_owned(),
                },
            );
        } else if items.is_empty() {
            let _: Read<()> = self.expected("a value");
        }
        let labelled = items.iter().filter(|item| item.colon.is_some()).count();
        let odd = if labelled == 0 || labelled == items.len() {
            None
        } else {
            // What is rarer is the slip.
            let label_is_rare = labelled * 2 < items.len();
            items
                .iter()
                .position(|item| item.colon.is_some() == label_is_rare)
        };
        if let Some(item) = odd.and_then(|odd| items.get(odd)) {
            let span = self.stretch(item.first, item.end);
            self.note(span, Fault::MixedList);
        }
        items
            .iter()
            .map(|item| self.item(item, odd.is_some()))
            .collect()
    }

    /// The `|` that ends the tokens.
    fn last_bar(&self) -> Option<crate::token::Token> {
        let last = self
            .end
            .checked_sub(1)
            .and_then(|at| self.tokens.get(at))
            .copied();
        last.filter(|last| last.kind == TokenKind::Bar)
    }

    /// The items between `|`, without the empty one behind a last `|`.
    fn split_items(&self) -> Vec<Item> {
        let mut items = Vec::new();
        let mut item = Item {
            first: self.at,
            colon: None,
            end: self.at,
        };
        let mut depth = 0u32;
        for at in self.at..self.end {
            match self.tokens.get(at).map(|token| token.kind) {
                Some(TokenKind::Bar) => {
                    depth = 0;
                    let next = Item {
                        first: at + 1,
                        colon: None,
                        end: at + 1,
                    };
                    items.push(std::mem::replace(&mut item, next));
                    continue;
                }
                Some(TokenKind::Open) => depth += 1,
                Some(TokenKind::Close) => depth = depth.saturating_sub(1),
                Some(TokenKind::Colon) if depth == 0 && item.colon.is_none() => {
                    item.colon = Some(at)
                }
                _ => {}
            }
            item.end = at + 1;
        }
        if item.end > item.first {
            items.push(item);
        }
        items
    }

    fn item(&mut self, item: &Item, mixed: bool) -> ListItem {
        let span = self.stretch(item.first, item.end);
        let label = item.colon.map(|colon| {
            let label = self.label(item.first, colon);
            self.at = colon + 1;
            label
        });
        if label.is_none() {
            self.at = item.first;
        }
        let mut value = self.toleranced(item.end);
        if mixed {
            value = Toleranced {
                value: error(value.value.span),
                tolerance: None,
            };
        }
        self.at = (item.end + 1).min(self.end);
        ListItem { label, value, span }
    }

    /// The label made of the tokens from index `first` up to `end`.
    fn label(&mut self, first: usize, end: usize) -> Words {
        let span = self.stretch(first, end);
        if first == end {
            self.note(
                span,
                Fault::Expected {
                    what: "a label",
                    found: ":".to_owned(),
                },
            );
        }
        let text = span.of(self.text);
        let whole_text = first + 1 == end && self.is_at(first, TokenKind::Text);
        Words {
            text: if whole_text {
                unquoted(text)
            } else {
                text.to_owned()
            },
            span,
        }
    }

    /// A line of the form of a definition of a function.
    ///
    /// ```text
    /// reserve(a, b [lb]) [lb] = b - a
    /// ```
    pub(super) fn function(&mut self) -> Read<StatementKind> {
        let name = self.name("a name")?;
        self.bump();
        let mut fine = true;
        let mut parameters = Vec::new();
        if !self.eat(TokenKind::Close) {
            parameters = self.parameters(&mut fine)?;
            if !self.eat(TokenKind::Close) {
                return self.expected("`,` or `)`");
            }
        }
        let (unit, read) = self.opt_unit_part();
        fine &= read;
        fine &= self.equals()?;
        let mut body = self.slot(self.end, Cursor::whole);
        if !fine {
            body.kind = ExprKind::Error;
        }
        Ok(StatementKind::Function(FunctionDefinition {
            name,
            parameters,
            unit,
            body,
        }))
    }

    fn parameters(&mut self, fine: &mut bool) -> Read<Vec<Parameter>> {
        let mut parameters = Vec::new();
        loop {
            let name = self.name("the name of a parameter")?;
            let (unit, read) = self.opt_unit_part();
            *fine &= read;
            parameters.push(Parameter { name, unit });
            if !self.eat(TokenKind::Comma) {
                return Ok(parameters);
            }
        }
    }

    /// What a line of the form of a definition was about to define, where it could not be read.
    pub(super) fn unread_definition(&self) -> StatementKind {
        let first = self
            .tokens
            .first()
            .filter(|first| first.kind == TokenKind::Name);
        StatementKind::Unreadable {
            defines: first.map(|first| self.name_of(*first)),
        }
    }

    /// A rule that may fail, with what stands for it then.
    pub(super) fn or_unread(&mut self, read: Read<StatementKind>) -> StatementKind {
        read.unwrap_or_else(|Unread| self.unread_definition())
    }
}

/// Makes every value an error, so that nothing is worked out from a unit that could not be read.
fn spoil(value: &mut DefinitionValue) {
    match value {
        DefinitionValue::One(one) => one.value.kind = ExprKind::Error,
        DefinitionValue::ByAxis { items, .. } => {
            for item in items {
                item.value.value.kind = ExprKind::Error;
            }
        }
    }
}
