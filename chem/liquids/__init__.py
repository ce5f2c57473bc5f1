"""One liquid: refraction, association evidence, cohesion."""
