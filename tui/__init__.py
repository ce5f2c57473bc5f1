"""The terminal side of stillroom: the command line and the workbench."""
