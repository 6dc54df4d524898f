//! The commands that we tell people to try, each once.

/// A command for the shell, with what it answers.
#[derive(Clone, Copy, Debug)]
pub struct Example {
    /// What the answer tells, a phrase.
    pub says: &'static str,
    /// The command; `{base}` stands for the service's own `http://host:port`.
    pub command: &'static str,
}

impl Example {
    /// The command for the service at `base`.
    pub fn at(&self, base: &str) -> String {
        self.command.replace("{base}", base)
    }
}

/// All of them, the most useful first; the start prints the first three.
pub static EXAMPLES: &[Example] = &[
    Example {
        says: "one target: its time and its distances",
        command: "curl '{base}/v1/convert?redshift=7.3&format=text'",
    },
    Example {
        says: "at what redshift was the universe 3 Gyr old?",
        command: "curl '{base}/v1/convert?age=3&to=redshift&format=text'",
    },
    Example {
        says: "an array, as JSON; null stays null",
        command: "curl {base}/v1/convert -H content-type:application/json -d '
  {\"from\": {\"quantity\": \"redshift\", \"values\": [0.5, 1.2, null]},
   \"to\": [\"age\", \"luminosity_distance\"]}'",
    },
    Example {
        says: "a table, in other units",
        command: "curl '{base}/v1/convert?redshift=0.5,1.2&to=age:Myr&format=csv'",
    },
    Example {
        says: "your own model: open, with matter and dark energy",
        command: "curl -G {base}/v1/convert -d redshift=1 -d format=text \\
  -d hubble_constant=70 -d matter=0.3 -d curvature=0.1",
    },
    Example {
        says: "what can be converted, and under which published models",
        command: "curl '{base}/v1/quantities' '{base}/v1/models'",
    },
];
