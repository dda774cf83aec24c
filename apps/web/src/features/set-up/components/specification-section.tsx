import { Loaded } from '../../../shared/ui/loaded';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Sheet } from '../../../shared/ui/sheet';
import { useProducts, useSpecifications } from '../api/set-up';
import { ProductSpecifications } from './product-specifications';
import '../specifications.css';

/** A table a product: what is in force, what was, and what waits for a second person. */
export function SpecificationSection({ plantId }: { plantId: number }) {
  const products = useProducts(plantId);
  const specifications = useSpecifications(plantId);
  return (
    <Loaded
      query={products}
      failure="The products could not be loaded."
      isEmpty={(found) => found.every(({ isRetired }) => isRetired)}
      empty={
        <Sheet title="Specifications">
          <EmptyNote>
            No product yet, so there is nothing to specify. An administrator adds products and characteristics first.
          </EmptyNote>
        </Sheet>
      }
    >
      {(found) => (
        <Sheet title="Specifications" isFlush margin={<SpecificationMargin />}>
          <Loaded query={specifications} failure="The specifications could not be loaded.">
            {(all) =>
              found
                .filter(({ isRetired }) => !isRetired)
                .map((product) => (
                  <ProductSpecifications
                    key={product.id}
                    plantId={plantId}
                    product={product}
                    specifications={all.filter((one) => one.product.id === product.id)}
                  />
                ))
            }
          </Loaded>
        </Sheet>
      )}
    </Loaded>
  );
}

function SpecificationMargin() {
  return (
    <>
      <p>A new version is proposed by one person and approved by another. Versions are never changed.</p>
      <p>Baselines are fitted to the deviation from the nominal value, so that a change of product is no drift.</p>
    </>
  );
}
