"""Two molecules: angle average, forces, contact, verdict, ranking."""
