"use strict";
const place = document.getElementById("viewer");
window.SwaggerUIBundle({
  url: place.dataset.document,
  dom_id: "#viewer",
  deepLinking: true,
  defaultModelsExpandDepth: 0,
  validatorUrl: null,
});
