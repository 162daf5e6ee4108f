//! Lines of plain text: the title block, headings, notes and asides.

use crate::lex::Opening;
use crate::lex::characters::is_blank;
use crate::lex::words::title_text;
use crate::problem::{Fault, Problem};
use crate::span::Span;
use crate::syntax::{StatementKind, TitleWord, Words};
use crate::token::Word;

/// What the sheet has seen of its title block.
#[derive(Debug, Default)]
pub(super) struct TitleBlock {
    closed: bool,
    seen: Vec<TitleWord>,
}

impl TitleBlock {
    pub(super) fn new(closed: bool) -> Self {
        TitleBlock {
            closed,
            seen: Vec::new(),
        }
    }

    pub(super) fn is_closed(&self) -> bool {
        self.closed
    }

    /// Takes note of a statement; every one but blank lines, asides and the block's own lines closes the block.
    pub(super) fn pass(&mut self, opening: Opening) {
        let passes = matches!(
            opening,
            Opening::Blank | Opening::Title(_) | Opening::Word(Word::Aside)
        );
        self.closed |= !passes;
    }

    /// Problems of a line of the block, whose word stands at `word`.
    fn judge(&mut self, title: TitleWord, word: Span, text: &Words) -> Option<Problem> {
        let name = || title_text(title).to_owned();
        let twice = self.seen.contains(&title);
        if !twice {
            self.seen.push(title);
        }
        let fault = if self.closed {
            Fault::TitleLate { word: name() }
        } else if twice {
            Fault::TitleTwice { word: name() }
        } else if is_value(title, &text.text) {
            return None;
        } else {
            let span = if text.text.is_empty() {
                word
            } else {
                text.span
            };
            let found = super::cursor::clipped(&text.text);
            return Some(Problem {
                span,
                fault: Fault::TitleValue {
                    word: name(),
                    found,
                },
            });
        };
        Some(Problem { span: word, fault })
    }
}

fn is_value(title: TitleWord, text: &str) -> bool {
    match title {
        TitleWord::Digits => {
            text.bytes().all(|byte| byte.is_ascii_digit())
                && text
                    .parse()
                    .is_ok_and(|digits: u32| (1..=15).contains(&digits))
        }
        TitleWord::Sources => text == "required",
        TitleWord::Units => !text.is_empty(),
        _ => true,
    }
}

/// A line of plain text, which opens with a word from byte `start` to byte `end` and goes up to byte `to`.
pub(super) fn prose(
    text: &str,
    opening: Opening,
    (start, end, to): (usize, usize, usize),
    block: &mut TitleBlock,
    problems: &mut Vec<Problem>,
) -> StatementKind {
    let rest = text.get(end..to).unwrap_or("");
    let trimmed = rest.trim_start_matches(is_blank);
    let first = end + (rest.len() - trimmed.len());
    let trimmed = trimmed.trim_end_matches(is_blank);
    let span = Span::new(first, first + trimmed.len());
    let words = Words {
        text: trimmed.to_owned(),
        span,
    };
    match opening {
        Opening::Title(word) => {
            problems.extend(block.judge(word, Span::new(start, end), &words));
            StatementKind::Title { word, text: words }
        }
        Opening::Word(Word::Part) => StatementKind::Part(words),
        Opening::Word(Word::Sub) => StatementKind::Sub(words),
        Opening::Word(Word::Aside) => StatementKind::Aside(words),
        _ => StatementKind::Note(words),
    }
}
