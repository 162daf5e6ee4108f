//! The arguments of the command line.

use std::ffi::OsString;

/// How the program is called.
pub(crate) const USAGE: &str = "\
usage: pitchwright run SHEET [--text|--json|--csv|--html] [--set SYMBOL=EXPR]... [--quantity SYMBOL]...
       pitchwright check SHEET...
       pitchwright fix SHEET [--dry-run]
       pitchwright trail SHEET SYMBOL [--at AXIS=LABEL]...
       pitchwright compare OLD NEW
       pitchwright functions [NAME]
       pitchwright units [TEXT]
       pitchwright reference
       pitchwright schema

SHEET may be - for standard input. --csv has the columns symbol, one for each axis, value, unit.
--html is the printed report, figures in it.
Exit status: 0 all well, 1 a requirement is not met or not shown, 2 the sheet has an error,
64 bad usage or an unknown symbol, 66 no such file.
";

/// What is to be done.
#[derive(Debug, PartialEq, Eq)]
pub(crate) enum Command {
    Help,
    Version,
    Run(Run),
    Check(Vec<OsString>),
    Fix {
        sheet: OsString,
        dry_run: bool,
    },
    Trail {
        sheet: OsString,
        symbol: String,
        at: Vec<(String, String)>,
    },
    Compare {
        old: OsString,
        new: OsString,
    },
    Functions(Option<String>),
    Units(Option<String>),
    /// The whole language as one text.
    Reference,
    /// The JSON Schema of `run --json`.
    Schema,
}

/// How a sheet is to be evaluated.
#[derive(Debug, PartialEq, Eq)]
pub(crate) struct Run {
    pub(crate) sheet: OsString,
    pub(crate) format: Format,
    /// Symbols and the right sides that replace theirs, in the order given.
    pub(crate) set: Vec<(String, String)>,
    /// Symbols whose values are all wanted.
    pub(crate) quantities: Vec<String>,
}

/// How the report is written.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub(crate) enum Format {
    #[default]
    Text,
    Json,
    Csv,
    /// The printed report.
    Html,
}

/// Reads the arguments behind the program's name.
///
/// # Errors
/// A sentence that says what is wrong with them.
pub(crate) fn read(arguments: impl Iterator<Item = OsString>) -> Result<Command, String> {
    let mut arguments = arguments;
    let word = arguments.next().ok_or("no command given")?;
    let word = word.to_string_lossy().into_owned();
    let words = Words::split(&word, arguments)?;
    if words.has("--help") {
        return Ok(Command::Help);
    }
    match word.as_str() {
        "help" | "--help" | "-h" => Ok(Command::Help),
        "--version" | "-V" => Ok(Command::Version),
        "run" => run(words),
        "check" if words.plain.is_empty() => Err("`check` wants at least one sheet".to_owned()),
        "check" => Ok(Command::Check(words.plain)),
        "fix" => {
            let dry_run = words.has("--dry-run");
            let [sheet] = words.exactly("fix", "one sheet")?;
            Ok(Command::Fix { sheet, dry_run })
        }
        "compare" => {
            let [old, new] = words.exactly("compare", "two sheets")?;
            Ok(Command::Compare { old, new })
        }
        "functions" => Ok(Command::Functions(words.at_most_one("functions")?)),
        "reference" => {
            let [] = words.exactly("reference", "nothing more")?;
            Ok(Command::Reference)
        }
        "schema" => {
            let [] = words.exactly("schema", "nothing more")?;
            Ok(Command::Schema)
        }
        "units" => Ok(Command::Units(words.at_most_one("units")?)),
        "trail" => trail(words),
        _ => Err(format!("unknown command `{word}`")),
    }
}

fn trail(words: Words) -> Result<Command, String> {
    let at = words.pairs_of("--at", "axis and label")?;
    let [sheet, symbol] = words.exactly("trail", "a sheet and a symbol")?;
    Ok(Command::Trail {
        sheet,
        symbol: symbol.to_string_lossy().into_owned(),
        at,
    })
}

fn run(words: Words) -> Result<Command, String> {
    let formats = [
        ("--text", Format::Text),
        ("--json", Format::Json),
        ("--csv", Format::Csv),
        ("--html", Format::Html),
    ];
    let mut chosen = formats.iter().filter(|(flag, _)| words.has(flag));
    let format = chosen.next().map_or(Format::Text, |(_, format)| *format);
    if chosen.next().is_some() {
        return Err("only one of --text, --json, --csv and --html can be given".to_owned());
    }
    let set = words.pairs_of("--set", "symbol and value")?;
    let quantities = words.values_of("--quantity");
    let [sheet] = words.exactly("run", "one sheet")?;
    Ok(Command::Run(Run {
        sheet,
        format,
        set,
        quantities,
    }))
}

/// Options that a command takes; those with `true` want a value.
fn options_of(command: &str) -> &'static [(&'static str, bool)] {
    match command {
        "run" => &[
            ("--text", false),
            ("--json", false),
            ("--csv", false),
            ("--html", false),
            ("--set", true),
            ("--quantity", true),
        ],
        "fix" => &[("--dry-run", false)],
        "trail" => &[("--at", true)],
        _ => &[],
    }
}

/// The arguments, options apart from the rest.
#[derive(Default)]
struct Words {
    plain: Vec<OsString>,
    options: Vec<(&'static str, String)>,
}

impl Words {
    fn split(command: &str, mut arguments: impl Iterator<Item = OsString>) -> Result<Self, String> {
        let mut words = Words::default();
        while let Some(argument) = arguments.next() {
            let text = argument.to_string_lossy().into_owned();
            if text == "--" {
                words.plain.extend(arguments);
                break;
            }
            if text == "-" || !text.starts_with('-') {
                words.plain.push(argument);
                continue;
            }
            let option = words.option(command, &text, &mut arguments)?;
            words.options.push(option);
        }
        Ok(words)
    }

    /// `--set X=1` or `--set=X=1`.
    fn option(
        &self,
        command: &str,
        text: &str,
        rest: &mut impl Iterator<Item = OsString>,
    ) -> Result<(&'static str, String), String> {
        if text == "--help" || text == "-h" {
            return Ok(("--help", String::new()));
        }
        let (name, given) = match text.split_once('=') {
            Some((name, value)) => (name, Some(value.to_owned())),
            None => (text, None),
        };
        let known = options_of(command)
            .iter()
            .find(|(option, _)| *option == name);
        let (option, wants_value) =
            *known.ok_or_else(|| format!("`{command}` has no option `{name}`"))?;
        match (wants_value, given) {
            (true, Some(value)) => Ok((option, value)),
            (true, None) => {
                let value = rest
                    .next()
                    .ok_or_else(|| format!("`{option}` wants a value"))?;
                Ok((option, value.to_string_lossy().into_owned()))
            }
            (false, None) => Ok((option, String::new())),
            (false, Some(_)) => Err(format!("`{option}` takes no value")),
        }
    }

    fn has(&self, option: &str) -> bool {
        self.options.iter().any(|(name, _)| *name == option)
    }

    fn values_of(&self, option: &str) -> Vec<String> {
        let options = self.options.iter().filter(|(name, _)| *name == option);
        options.map(|(_, value)| value.clone()).collect()
    }

    /// Values of the form `NAME=TEXT`.
    fn pairs_of(&self, option: &str, between: &str) -> Result<Vec<(String, String)>, String> {
        let pair = |text: String| {
            let parts = text.split_once('=');
            let (name, value) = parts
                .ok_or_else(|| format!("`{option} {text}` lacks the `=` between {between}"))?;
            Ok((name.trim().to_owned(), value.trim().to_owned()))
        };
        self.values_of(option).into_iter().map(pair).collect()
    }

    fn exactly<const N: usize>(self, command: &str, what: &str) -> Result<[OsString; N], String> {
        let given = <[OsString; N]>::try_from(self.plain);
        given.map_err(|_| format!("`{command}` wants {what}"))
    }

    fn at_most_one(self, command: &str) -> Result<Option<String>, String> {
        let mut plain = self.plain.into_iter();
        let first = plain.next().map(|word| word.to_string_lossy().into_owned());
        match plain.next() {
            None => Ok(first),
            Some(_) => Err(format!("`{command}` wants one name at most")),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn parsed(line: &[&str]) -> Result<Command, String> {
        read(line.iter().map(OsString::from))
    }

    #[test]
    fn a_run_takes_its_options_in_any_order() {
        let command = parsed(&[
            "run",
            "--json",
            "--set",
            "x_cg=6.2 ft",
            "a.pitchwright",
            "--set=k = a=b",
            "--quantity",
            "P_t",
        ]);
        assert_eq!(
            command,
            Ok(Command::Run(Run {
                sheet: "a.pitchwright".into(),
                format: Format::Json,
                set: vec![
                    ("x_cg".to_owned(), "6.2 ft".to_owned()),
                    ("k".to_owned(), "a=b".to_owned()),
                ],
                quantities: vec!["P_t".to_owned()],
            }))
        );
    }

    #[test]
    fn bad_usage_is_said() {
        for (line, word) in [
            (&[][..], "no command"),
            (&["evaluate"], "unknown command `evaluate`"),
            (&["run"], "one sheet"),
            (&["run", "a", "b"], "one sheet"),
            (&["run", "a", "--xml"], "no option `--xml`"),
            (&["run", "a", "--json", "--csv"], "only one"),
            (&["run", "a", "--set"], "wants a value"),
            (&["run", "a", "--set", "x"], "lacks the `=`"),
            (&["run", "a", "--json=1"], "takes no value"),
            (&["check"], "at least one"),
            (&["compare", "a"], "two sheets"),
            (&["trail", "a"], "a sheet and a symbol"),
            (&["trail", "a", "x", "--at", "cg"], "lacks the `=`"),
            (&["units", "a", "b"], "one name at most"),
        ] {
            let message = parsed(line).unwrap_err();
            assert!(message.contains(word), "{line:?}: {message}");
        }
    }

    #[test]
    fn a_trail_takes_labels_of_axes() {
        let command = parsed(&["trail", "a", "P_t", "--at", "cg=aft", "--at=point=D"]);
        let pair = |a: &str, b: &str| (a.to_owned(), b.to_owned());
        assert_eq!(
            command,
            Ok(Command::Trail {
                sheet: "a".into(),
                symbol: "P_t".to_owned(),
                at: vec![pair("cg", "aft"), pair("point", "D")],
            })
        );
    }

    #[test]
    fn a_dash_is_a_sheet_and_two_end_the_options() {
        assert_eq!(
            parsed(&["check", "-", "--", "--json"]),
            Ok(Command::Check(vec!["-".into(), "--json".into()]))
        );
        assert_eq!(parsed(&["run", "--help"]), Ok(Command::Help));
        let Ok(Command::Run(run)) = parsed(&["run", "a", "--html"]) else {
            panic!("a run");
        };
        assert_eq!(run.format, Format::Html);
    }
}
