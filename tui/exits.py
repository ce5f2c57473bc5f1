"""Exit statuses of the `stillroom` command."""

OK = 0
NO_RESULT = 1  # the question was understood, and nothing answers it
BAD_INPUT = 2  # one line on stderr says what, where and what was expected
