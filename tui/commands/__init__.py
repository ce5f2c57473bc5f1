"""One module per sub-command of `stillroom`."""
