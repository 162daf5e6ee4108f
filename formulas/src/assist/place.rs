//! What kind of thing can stand at a place, told from the tokens before it.

use super::complete::{symbol_dimension, title_values};
use super::desk::{Desk, Spot};
use crate::catalogue::{self, Wants};
use crate::token::{Sign, Token, TokenKind, Word};
use engine::quantity::Dimension;

/// What can stand at a place.
#[derive(Clone, Debug, PartialEq)]
pub(super) enum Place {
    /// Free text, or the middle of a number.
    Nothing,
    /// The first word of a line.
    Line,
    /// A unit, of that dimension if one is due.
    Unit(Option<Dimension>),
    /// A field of what the names lead to.
    Fields(Vec<String>),
    /// An axis.
    Axes,
    /// An axis before its selection.
    PickAxes,
    /// A label of an axis, with quotes of its own or within quotes that are open.
    Labels { axis: String, quoted: bool },
    /// A label before its value.
    ListLabels(String),
    /// A word of the title block's closed choice.
    TitleWords(&'static [&'static str]),
    /// One of the words that an argument can be.
    Words(&'static [&'static str]),
    /// The name of another sheet.
    Sheets,
    /// The selection of a pick.
    Selection { axis: String, call: Option<String> },
    /// An expression, in a call of that function, with words that may follow.
    Expression {
        call: Option<String>,
        words: &'static [&'static str],
    },
}

/// The tokens before a place.
struct Before<'a> {
    desk: &'a Desk<'a>,
    text: &'a str,
    tokens: &'a [Token],
}

/// What can stand there, and how many bytes before it are the piece being typed.
pub(super) fn place(desk: &Desk<'_>, spot: &Spot<'_>, tokens: &[Token]) -> (Place, usize) {
    let text = spot.text.get(..spot.at).unwrap_or("");
    let Some((last, earlier)) = tokens.split_last() else {
        return (Place::Line, 0);
    };
    let touches = last.span.end as usize == spot.at;
    let before = |tokens| Before { desk, text, tokens };
    let first = tokens.first().map(|t| t.kind);
    match last.kind {
        TokenKind::Remark => return (Place::Nothing, 0),
        TokenKind::Prose | TokenKind::Title(_) => return title(first, text, touches, tokens),
        TokenKind::OpenText => {
            let piece = spot.at - last.span.start as usize;
            return (before(earlier).in_quotes(), piece.saturating_sub(1));
        }
        TokenKind::OpenBracket => {
            let piece = unit_piece(text.get(last.span.start as usize + 1..).unwrap_or(""));
            return (Place::Unit(before(earlier).bracket_dimension()), piece);
        }
        TokenKind::Unit if touches => {
            let piece = unit_piece(last.span.of(text));
            return (Place::Unit(before(earlier).number_dimension()), piece);
        }
        TokenKind::Number if !touches => {
            return (Place::Unit(before(tokens).number_dimension()), 0);
        }
        TokenKind::Number | TokenKind::BrokenNumber | TokenKind::Text | TokenKind::Bracket
            if touches =>
        {
            return (Place::Nothing, 0);
        }
        _ => {}
    }
    let typing = touches && matches!(last.kind, TokenKind::Name | TokenKind::Word(_));
    if typing {
        let piece = spot.at - last.span.start as usize;
        (before(earlier).behind(), piece)
    } else if touches && last.kind == TokenKind::Label {
        (Place::Nothing, 0)
    } else {
        (before(tokens).behind(), 0)
    }
}

/// The value of a line of the title block.
fn title(first: Option<TokenKind>, text: &str, touches: bool, tokens: &[Token]) -> (Place, usize) {
    let Some(TokenKind::Title(word)) = first else {
        return (Place::Nothing, 0);
    };
    if tokens.len() == 1 && touches {
        return (Place::Line, text.trim_start().len());
    }
    let words = title_values(word);
    let piece = text.len() - text.rfind([' ', '\t']).map_or(0, |at| at + 1);
    if words.is_empty() {
        (Place::Nothing, 0)
    } else {
        (Place::TitleWords(words), piece)
    }
}

/// Bytes of the unit name being typed at the end of a unit.
fn unit_piece(text: &str) -> usize {
    let cut = text.rfind(['.', '/', '*', '-', '·', ' ', '(', '^']);
    let start = cut.map_or(0, |at| {
        at + text
            .get(at..)
            .and_then(|t| t.chars().next())
            .map_or(1, char::len_utf8)
    });
    text.len() - start
}

impl Before<'_> {
    fn kind(&self, back: usize) -> Option<TokenKind> {
        let at = self.tokens.len().checked_sub(back)?;
        self.tokens.get(at).map(|t| t.kind)
    }

    fn word(&self, back: usize) -> &str {
        let token = self.tokens.len().checked_sub(back);
        token
            .and_then(|at| self.tokens.get(at))
            .map_or("", |t| t.span.of(self.text))
    }

    /// The names joined by points that end behind the last token, `air` in `air.`.
    fn path(&self) -> Vec<String> {
        let mut path = Vec::new();
        let mut back = 1;
        while self.kind(back) == Some(TokenKind::Dot)
            && self.kind(back + 1) == Some(TokenKind::Name)
        {
            path.push(self.word(back + 1).to_string());
            back += 2;
        }
        path.reverse();
        path
    }

    /// What can stand behind the tokens.
    fn behind(&self) -> Place {
        match self.kind(1) {
            None => return Place::Line,
            Some(TokenKind::Dot) => return Place::Fields(self.path()),
            Some(TokenKind::Word(Word::Over)) => return Place::Axes,
            Some(TokenKind::Word(Word::Use)) => return Place::Nothing,
            Some(TokenKind::Word(
                Word::Vary | Word::Table | Word::Figure | Word::Freebody | Word::Unknown,
            )) => return Place::Nothing,
            Some(TokenKind::Word(
                Word::Part | Word::Sub | Word::Note | Word::Aside | Word::End,
            )) => return Place::Nothing,
            _ => {}
        }
        if let Some(place) = self.in_statement() {
            return place;
        }
        let open = self.innermost_open();
        let call = open.and_then(|at| self.called(at));
        if let Some(at) = open
            && self.before_is(at, TokenKind::Word(Word::At))
        {
            return self.in_pick(at, call);
        }
        if self.names_axes() {
            return Place::Axes;
        }
        Place::Expression {
            call,
            words: self.words(),
        }
    }

    /// Places that hang on the word that opens the statement.
    fn in_statement(&self) -> Option<Place> {
        let by = self.by();
        match (self.tokens.first()?.kind, self.kind(1)?) {
            (_, TokenKind::Name) if self.word(1) == "by" && by.is_some() => Some(Place::Axes),
            (_, TokenKind::Equals | TokenKind::Bar) if by.is_some() => {
                let axis = by.filter(|axis| self.desk.labels(axis).is_some())?;
                Some(Place::ListLabels(axis))
            }
            (TokenKind::Word(Word::Figure), TokenKind::Name) if self.word(1) == "each" => {
                Some(Place::Axes)
            }
            (TokenKind::Word(Word::Vary), _) => Some(Place::Expression {
                call: None,
                words: &["to", "step", "count"],
            })
            .filter(|_| self.tokens.len() > 2),
            _ => None,
        }
    }

    /// The axis of `symbol [unit] by axis`; empty while it is typed.
    fn by(&self) -> Option<String> {
        let second = self.tokens.get(1)?;
        let at = if second.kind == TokenKind::Bracket {
            2
        } else {
            1
        };
        let by = self.tokens.get(at)?;
        let opens = self.tokens.first()?.kind == TokenKind::Name;
        if !opens || by.kind != TokenKind::Name || by.span.of(self.text) != "by" {
            return None;
        }
        let axis = self.tokens.get(at + 1);
        Some(axis.map_or("", |t| t.span.of(self.text)).to_string())
    }

    /// The bracket that is open at the end.
    fn innermost_open(&self) -> Option<usize> {
        let mut depth = 0usize;
        for (at, token) in self.tokens.iter().enumerate().rev() {
            match token.kind {
                TokenKind::Close => depth += 1,
                TokenKind::Open if depth == 0 => return Some(at),
                TokenKind::Open => depth -= 1,
                _ => {}
            }
        }
        None
    }

    fn before_is(&self, at: usize, kind: TokenKind) -> bool {
        at.checked_sub(1)
            .and_then(|at| self.tokens.get(at))
            .is_some_and(|t| t.kind == kind)
    }

    /// The function that a bracket calls.
    fn called(&self, open: usize) -> Option<String> {
        let before = self.tokens.get(open.checked_sub(1)?)?;
        (before.kind == TokenKind::Name).then(|| before.span.of(self.text).to_string())
    }

    fn in_pick(&self, open: usize, call: Option<String>) -> Place {
        let inside = self.tokens.len() - open - 1;
        match self.kind(1) {
            Some(TokenKind::Open | TokenKind::Comma) => Place::PickAxes,
            Some(TokenKind::Colon) if inside >= 2 => {
                let axis = self.word(2).to_string();
                Place::Selection { axis, call }
            }
            _ => Place::Expression {
                call,
                words: &["smooth", "nearest", "held"],
            },
        }
    }

    /// Whether the tokens end in `over a,` or `each a,`.
    fn names_axes(&self) -> bool {
        let mut back = 1;
        while self.kind(back) == Some(TokenKind::Comma)
            && self.kind(back + 1) == Some(TokenKind::Name)
        {
            back += 2;
        }
        back > 1
            && (self.kind(back) == Some(TokenKind::Word(Word::Over))
                || self.kind(back) == Some(TokenKind::Name) && self.word(back) == "each")
    }

    /// Words that may follow, by the statement.
    fn words(&self) -> &'static [&'static str] {
        match self.tokens.first().map(|t| t.kind) {
            Some(TokenKind::Word(Word::Unknown)) => &["between", "and", "such that"],
            Some(TokenKind::Word(Word::Figure)) => &["against", "each", "closed"],
            Some(TokenKind::Word(Word::Freebody)) => &["couple", "axial"],
            Some(TokenKind::Word(Word::Governing)) => &["over"],
            Some(TokenKind::Word(Word::Use)) => &["as"],
            _ => &["at", "over", "then", "else"],
        }
    }

    /// Within quotes that are open.
    fn in_quotes(&self) -> Place {
        match (self.kind(1), self.kind(2)) {
            (Some(TokenKind::Word(Word::Use)), _) => Place::Sheets,
            (Some(TokenKind::Colon | TokenKind::Equals), Some(TokenKind::Name))
            | (Some(TokenKind::Sign(Sign::NotEqual)), Some(TokenKind::Name))
                if self.desk.labels(self.word(2)).is_some() =>
            {
                let axis = self.word(2).to_string();
                Place::Labels {
                    axis,
                    quoted: false,
                }
            }
            _ => self
                .argument()
                .map_or(Place::Nothing, |p| Place::Words(p.words)),
        }
    }

    /// The argument of a catalogue function that is due.
    fn argument(&self) -> Option<&'static catalogue::Parameter> {
        let open = self.innermost_open()?;
        let entry = catalogue::entry(&self.called(open)?)?;
        if self.kind(1) == Some(TokenKind::Colon) {
            let name = self.word(2);
            return entry.parameters.iter().find(|p| p.name == name);
        }
        let mut depth = 0usize;
        let mut place = 0;
        for token in self.tokens.get(open + 1..)? {
            match token.kind {
                TokenKind::Open => depth += 1,
                TokenKind::Close => depth = depth.saturating_sub(1),
                TokenKind::Comma if depth == 0 => place += 1,
                _ => {}
            }
        }
        entry.parameters.get(place)
    }

    /// The dimension due behind a number: of an argument, or of the value before a sign.
    fn number_dimension(&self) -> Option<Dimension> {
        let last = self
            .tokens
            .iter()
            .rposition(|t| t.kind == TokenKind::Number)?;
        let before = Before {
            tokens: self.tokens.get(..last)?,
            ..*self
        };
        match before.kind(1) {
            Some(TokenKind::Open | TokenKind::Comma | TokenKind::Colon) => {
                match before.argument()?.wants {
                    Wants::Dimension(dimension) => Some(dimension),
                    Wants::ForceOrMass => Some(Dimension::FORCE),
                    Wants::MassOrWeight => Some(Dimension::MASS),
                    _ => None,
                }
            }
            Some(TokenKind::Sign(sign))
                if !matches!(sign, Sign::Times | Sign::Divide | Sign::Power) =>
            {
                symbol_dimension(self.desk, before.word(2))
            }
            Some(TokenKind::Equals) => symbol_dimension(self.desk, before.word(2)),
            _ => None,
        }
    }

    /// The dimension that the symbol before a bracket has.
    fn bracket_dimension(&self) -> Option<Dimension> {
        symbol_dimension(self.desk, self.word(1))
    }
}
