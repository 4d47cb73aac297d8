"""One module a command, each with ``run(arguments) -> Status``; imported when the command runs."""
